import type { Goal } from '@pegwell/shared/session/evening';
import { useState } from 'react';
import { useMedia } from '../../../lib/use-media';
import { ChoiceSwitch } from '../../../ui/choice-switch';
import type { Compared } from '../compare';
import { OrderPicture, type Proof } from './order-picture';
import styles from './suggestion.module.css';

interface OrderPicturesProps {
  readonly before: Compared;
  readonly after: Compared;
  readonly goal: Goal;
  readonly proof: Proof;
}

const ORDERS = [
  { value: 'suggested', label: 'Suggested' },
  { value: 'mine', label: 'As you have it' },
] as const;

/** Both orders under each other; on a phone one at a time, the suggested first. */
export function OrderPictures({ before, after, goal, proof }: OrderPicturesProps) {
  const phone = useMedia('(max-width: 600px)');
  const [shown, setShown] = useState<(typeof ORDERS)[number]['value']>('suggested');
  const roomBefore = [before, after].some(({ places }) => (places[0]?.pegChanges ?? 0) > 0);
  const common = { goal, roomBefore };
  const mine = <OrderPicture compared={before} heading="as you have it" {...common} />;
  const suggested = <OrderPicture compared={after} heading="suggested" proof={proof} {...common} />;
  return phone ? (
    <div className={styles.orders}>
      <ChoiceSwitch legend="Lanes of which order" choices={ORDERS} value={shown} onChoose={setShown} />
      {shown === 'mine' ? mine : suggested}
    </div>
  ) : (
    <div className={styles.orders}>
      {mine}
      {suggested}
    </div>
  );
}
