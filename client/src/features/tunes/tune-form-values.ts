import { zodResolver } from '@hookform/resolvers/zod';
import {
  createTuneSchema,
  type CreateTune,
  type Tune,
  type UpdateTune,
} from '@pegwell/shared/contract/tunes';
import { readKindTunings } from '@pegwell/shared/tunes/kind-tunings';
import type { Resolver } from 'react-hook-form';

/** What is typed, field by field as it is sent; an empty text means that nothing is said. */
export type TuneFormValues = CreateTune;

/** The contract's schema, and whether each tuning can be read: said at the same places as the server says it. */
const tuneFormSchema = createTuneSchema.superRefine(({ tunings }, context) => {
  for (const { path, message } of readKindTunings(tunings, 'tunings').errors) {
    const steps = path.split('.').map((step) => (/^\d+$/.test(step) ? Number(step) : step));
    context.addIssue({ code: 'custom', path: steps, message });
  }
});

// `raw` hands on what was typed; the schema's input is wider than the form's values, hence the cast.
export const tuneFormResolver = zodResolver(tuneFormSchema, undefined, {
  raw: true,
}) as unknown as Resolver<TuneFormValues>;

export const NEW_TUNE: TuneFormValues = {
  title: '',
  key: 'D',
  mode: 'major',
  rhythm: '',
  parts: '',
  composer: '',
  source: '',
  notes: '',
  tunings: [],
};

export function valuesOf(tune: Tune): TuneFormValues {
  return {
    title: tune.title,
    key: tune.key,
    mode: tune.mode,
    rhythm: tune.rhythm ?? '',
    parts: tune.parts ?? '',
    composer: tune.composer ?? '',
    source: tune.source ?? '',
    notes: tune.notes ?? '',
    tunings: tune.tunings.map(({ kind, accepted }) => ({
      kind,
      accepted: accepted.map(({ tuning, capo }) => ({ tuning, capo })),
    })),
  };
}

/** The fields that were changed, whole: what is absent stays as another host may have left it. */
export function changesOf(before: TuneFormValues, after: TuneFormValues): UpdateTune {
  const changed = Object.entries(after).filter(
    ([name, value]) => JSON.stringify(value) !== JSON.stringify(before[name as keyof TuneFormValues]),
  );
  return Object.fromEntries(changed);
}
