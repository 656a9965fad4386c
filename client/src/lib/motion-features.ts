/** What moves things from place to place; loaded after the page, in a piece of its own. */
export { domMax as features } from 'framer-motion';
