import type { Session, UpdateSession } from '@pegwell/shared/contract/sessions';
import { BUILT_IN_KINDS, standardPitches } from '@pegwell/shared/music/instrument';
import { NAMED_TUNINGS } from '@pegwell/shared/music/named-tunings';
import { showTuning } from '@pegwell/shared/music/tuning';
import { useId, useState } from 'react';
import { timeZones } from '../../../lib/format';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button } from '../../../ui/button';
import { CheckField } from '../../../ui/check-field';
import { Dialog } from '../../../ui/dialog';
import { FormProblems, SelectField, TextAreaField, TextField } from '../../../ui/fields';
import styles from './dialogs.module.css';

interface DetailsDialogProps {
  readonly session: Session;
  readonly onSave: (changes: UpdateSession) => Promise<unknown>;
  readonly onClose: () => void;
}

interface Values {
  title: string;
  startsAt: string;
  timeZone: string;
  place: string;
  notes: string;
  /** By kind id: how many retune, as typed. */
  chairs: Record<string, string>;
  /** By kind id: what they arrive tuned to; empty for standard. */
  openings: Record<string, string>;
  /** By kind id: they tune to the first tune. */
  free: Record<string, boolean>;
  spaced: string;
}

function valuesOf(session: Session): Values {
  const openings: Record<string, string> = {};
  const free: Record<string, boolean> = {};
  const chairs: Record<string, string> = {};
  for (const kind of BUILT_IN_KINDS) {
    const opening = session.openings[kind.id];
    const standard = showTuning(kind, standardPitches(kind));
    openings[kind.id] = opening && opening !== standard ? opening : '';
    free[kind.id] = opening === null;
    chairs[kind.id] = String(session.chairs.find((each) => each.kind === kind.id)?.count ?? 0);
  }
  return {
    title: session.title,
    startsAt: session.localStart.slice(0, 16),
    timeZone: session.timeZone,
    place: session.place ?? '',
    notes: session.notes ?? '',
    chairs,
    openings,
    free,
    spaced: session.spacedRhythms.join(', '),
  };
}

function changesOf(values: Values): UpdateSession {
  const { title, startsAt, timeZone, place, notes } = values;
  const openings: Record<string, string | null> = {};
  for (const { id } of BUILT_IN_KINDS) {
    const text = values.openings[id]?.trim();
    if (values.free[id]) openings[id] = null;
    else if (text) openings[id] = text;
  }
  return {
    ...{ title, startsAt, timeZone, openings },
    place: place.trim() || null,
    notes: notes.trim() || null,
    chairs: BUILT_IN_KINDS.map(({ id }) => ({ kind: id, count: Number(values.chairs[id] ?? 0) })),
    spacedRhythms: values.spaced
      .split(',')
      .map((word) => word.trim())
      .filter(Boolean),
  };
}

/** When and where, who retunes, and what people arrive tuned to. */
export function DetailsDialog({ session, onSave, onClose }: DetailsDialogProps) {
  const { form, problems, submit } = useProblemForm<Values>({ defaultValues: valuesOf(session) });
  const { register, watch, formState } = form;
  const { errors, isSubmitting } = formState;
  const id = useId();
  const chairs = watch('chairs');
  const inRoom = BUILT_IN_KINDS.filter((kind) => Number(chairs[kind.id] ?? 0) > 0);
  const [all, setAll] = useState(false);
  const usual = ['fiddle', 'banjo', 'guitar', 'mandolin'];
  const offered = BUILT_IN_KINDS.filter((kind) => all || usual.includes(kind.id) || inRoom.includes(kind));
  const save = submit(async (values) => {
    await onSave(changesOf(values));
    onClose();
  });

  return (
    <Dialog
      open
      onClose={onClose}
      size="lg"
      title="The evening"
      actions={
        <>
          <Button type="submit" form={id} busy={isSubmitting && 'Saving'}>
            Save
          </Button>
          <Button look="outline" onClick={onClose}>
            Leave it
          </Button>
        </>
      }
    >
      <form id={id} className={styles.form} onSubmit={save} noValidate>
        <FormProblems problems={problems} />
        <TextField label="Title" error={errors.title?.message} {...register('title')} />
        <div className={styles.row}>
          <TextField
            label="Begins"
            type="datetime-local"
            error={errors.startsAt?.message}
            {...register('startsAt')}
          />
          <SelectField label="Time zone" error={errors.timeZone?.message} {...register('timeZone')}>
            {[...new Set([session.timeZone, ...timeZones()])].map((zone) => (
              <option key={zone}>{zone}</option>
            ))}
          </SelectField>
        </div>
        <TextField label="Place" error={errors.place?.message} {...register('place')} />
        <fieldset className={styles.group}>
          <legend>Who retunes</legend>
          <p className={styles.about}>
            Players who follow the tunings. Those who stay in standard all night are not counted.
          </p>
          <div className={styles.row}>
            {offered.map((kind) => (
              <TextField
                key={kind.id}
                label={kind.plural}
                type="number"
                min={0}
                max={200}
                inputMode="numeric"
                error={errors.chairs?.[kind.id]?.message}
                {...register(`chairs.${kind.id}`)}
              />
            ))}
          </div>
          {all ? null : (
            <div>
              <Button look="plain" onClick={() => setAll(true)}>
                More instruments
              </Button>
            </div>
          )}
        </fieldset>
        {inRoom.length > 0 ? (
          <fieldset className={styles.group}>
            <legend>Arrive tuned to</legend>
            {inRoom.map((kind) => (
              <div key={kind.id}>
                <TextField
                  label={kind.plural}
                  placeholder={showTuning(kind, standardPitches(kind))}
                  autoComplete="off"
                  autoCapitalize="off"
                  spellCheck={false}
                  list={`${id}-${kind.id}`}
                  error={errors.openings?.[kind.id]?.message}
                  {...register(`openings.${kind.id}`)}
                />
                <datalist id={`${id}-${kind.id}`}>
                  {(NAMED_TUNINGS[kind.id] ?? []).map(({ pitches, names }) => (
                    <option key={pitches.join()} value={showTuning(kind, pitches)}>
                      {names.join(', ')}
                    </option>
                  ))}
                </datalist>
                <CheckField label="They tune to the first tune" {...register(`free.${kind.id}`)} />
              </div>
            ))}
          </fieldset>
        ) : null}
        <TextField
          label="Not twice in a row"
          hint="Rhythms to keep apart, by comma."
          error={errors.spaced?.message}
          {...register('spaced')}
        />
        <TextAreaField label="Notes for the set sheet" error={errors.notes?.message} {...register('notes')} />
      </form>
    </Dialog>
  );
}
