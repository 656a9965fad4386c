import { LazyMotion, MotionConfig } from 'framer-motion';
import type { ReactNode } from 'react';

const load = () => import('../lib/motion-features').then(({ features }) => features);

/**
 * Where things may travel to new places (`m` elements); what moves them is loaded after the page. It stays up
 * while parts of the page change: what is mounted later finds it ready. None with reduced motion.
 */
export function Moving({ children }: { readonly children: ReactNode }) {
  return (
    <LazyMotion features={load}>
      <MotionConfig reducedMotion="user" transition={{ duration: 0.45, ease: [0.2, 0.7, 0.2, 1] }}>
        {children}
      </MotionConfig>
    </LazyMotion>
  );
}
