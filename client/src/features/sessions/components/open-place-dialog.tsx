import { openPlaceSchema, type OpenPlace } from '@pegwell/shared/contract/sessions';
import type { KindTunings } from '@pegwell/shared/contract/tunes';
import { modeSchema } from '@pegwell/shared/contract/keys';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseAccepted, showTuning } from '@pegwell/shared/music/tuning';
import { useState } from 'react';
import { TONICS } from '../../../music/key-words';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { SelectField, TextField } from '../../../ui/fields';
import type { AssumedFor } from '../entries';
import styles from './dialogs.module.css';

interface OpenPlaceDialogProps {
  /** Null for a new one. */
  readonly open: OpenPlace | null;
  /** The kinds in the room. */
  readonly kinds: readonly string[];
  readonly assumedFor: AssumedFor;
  readonly onSave: (open: OpenPlace) => void;
  readonly onClose: () => void;
}

/** "A tunes, 40 minutes, whoever calls": a key, how long, and what everyone is tuned to. */
export function OpenPlaceDialog({ open, kinds, assumedFor, onSave, onClose }: OpenPlaceDialogProps) {
  const [key, setKey] = useState(open?.key ?? 'A');
  const [mode, setMode] = useState(open?.mode ?? 'major');
  const [minutes, setMinutes] = useState(String(open?.minutes ?? 20));
  const [cells, setCells] = useState<Readonly<Record<string, string>>>(() => cellsOf(open));
  const [problems, setProblems] = useState<Readonly<Record<string, string>>>({});

  const save = () => {
    const found: Record<string, string> = {};
    const tunings = Object.entries(cells).flatMap(([kind, cell]): KindTunings[] => {
      const row = readCell(kind, cell);
      if (typeof row === 'string') found[kind] = row;
      return typeof row === 'object' && row ? [row] : [];
    });
    const parsed = openPlaceSchema.safeParse({ key, mode, tunings, minutes: Number(minutes) });
    if (!parsed.success) found['minutes'] = 'Minutes are a number from 1 to 600.';
    setProblems(found);
    if (parsed.success && Object.keys(found).length === 0) onSave(parsed.data);
  };

  return (
    <Dialog
      open
      onClose={onClose}
      title={open ? 'Change the open place' : 'An open place'}
      about="Time in one key for whoever calls. It is scored like a tune."
      actions={
        <>
          <Button onClick={save}>{open ? 'Change it' : 'Put it on the board'}</Button>
          <Button look="outline" onClick={onClose}>
            Leave it
          </Button>
        </>
      }
    >
      <form
        className={styles.form}
        onSubmit={(event) => {
          event.preventDefault();
          save();
        }}
      >
        <div className={styles.row}>
          <SelectField label="Key" value={key} onChange={(event) => setKey(event.target.value)}>
            {TONICS.map((tonic) => (
              <option key={tonic}>{tonic}</option>
            ))}
          </SelectField>
          <SelectField
            label="Mode"
            value={mode}
            onChange={(event) => setMode(modeSchema.parse(event.target.value))}
          >
            {modeSchema.options.map((each) => (
              <option key={each}>{each}</option>
            ))}
          </SelectField>
          <TextField
            label="Minutes"
            inputMode="numeric"
            value={minutes}
            error={problems['minutes']}
            onChange={(event) => setMinutes(event.target.value)}
          />
        </div>
        {kinds.map((kindId) => {
          const kind = builtInKind(kindId);
          if (!kind) return null;
          const assumed = assumedFor(kindId, key, mode);
          return (
            <TextField
              key={kindId}
              label={`${kind.plural} in`}
              hint={`Left empty: ${assumed === 'any' ? 'as they stand' : `${assumed}, assumed`}. Several with “or”.`}
              autoComplete="off"
              autoCapitalize="off"
              spellCheck={false}
              value={cells[kindId] ?? ''}
              error={problems[kindId]}
              onChange={(event) => setCells({ ...cells, [kindId]: event.target.value })}
            />
          );
        })}
        {/* Enter saves from any field. */}
        <button type="submit" hidden />
      </form>
    </Dialog>
  );
}

function cellsOf(open: OpenPlace | null): Readonly<Record<string, string>> {
  const rows = (open?.tunings ?? []).map(({ kind, accepted }) => {
    const cell = accepted.map(({ tuning, capo }) => (capo > 0 ? `${tuning} capo ${capo}` : tuning));
    return [kind, cell.join(' or ')] as const;
  });
  return Object.fromEntries(rows);
}

/** A row for the open place, null for an empty cell, or the sentence that refuses it. */
function readCell(kindId: string, cell: string): KindTunings | string | null {
  const kind = builtInKind(kindId);
  if (!kind || cell.trim() === '') return null;
  const parsed = parseAccepted(kind, cell);
  if (!parsed.ok) return parsed.reason;
  if (parsed.value === 'any') return { kind: kindId, accepted: [{ tuning: 'any', capo: 0 }] };
  return {
    kind: kindId,
    accepted: parsed.value.map(({ pitches, capo }) => ({ tuning: showTuning(kind, pitches), capo })),
  };
}
