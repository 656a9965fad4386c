import type { Mode } from '@pegwell/shared/contract/keys';
import type { Tuned } from '@pegwell/shared/music/tuning';

/** One way a tune is played, as an evening needs it. Kinds on which the setting is silent are absent. */
export interface PlayableSetting {
  readonly id: string;
  readonly key: string;
  readonly mode: Mode;
  readonly usual: boolean;
  readonly removed: boolean;
  readonly stated: Readonly<Record<string, readonly Tuned[] | 'any'>>;
}

export interface PlayableTune {
  readonly id: string;
  readonly title: string;
  readonly rhythm: string | null;
  readonly parts: string | null;
  readonly notes: string | null;
  readonly removed: boolean;
  readonly settings: readonly PlayableSetting[];
}
