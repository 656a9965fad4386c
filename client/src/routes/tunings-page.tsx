import { BUILT_IN_KINDS, builtInKind, standardPitches } from '@pegwell/shared/music/instrument';
import { NAMED_TUNINGS } from '@pegwell/shared/music/named-tunings';
import { showTuning } from '@pegwell/shared/music/tuning';
import { Link, useSearchParams } from 'react-router-dom';
import { UsualSection } from '../features/circles/components/usual-section';
import { NamedTunings } from '../features/instruments/components/named-tunings';
import { Safety } from '../features/instruments/components/safety';
import { TuningMatrix } from '../features/instruments/components/tuning-matrix';
import { SelectField } from '../ui/fields';
import { Page, PageHeading } from '../ui/page';
import styles from './tunings-page.module.css';
import { useCircle } from './use-circle';

/** One instrument at a time: its named tunings, the way there in pegs, and what the circle usually plays it in. */
export function TuningsPage() {
  const circle = useCircle();
  const [params, setParams] = useSearchParams();
  const kind = builtInKind(params.get('kind') ?? '') ?? BUILT_IN_KINDS[0];
  if (!kind) throw new Error('there are no built-in kinds');
  const named = NAMED_TUNINGS[kind.id] ?? [];
  const from =
    named.find(({ pitches }) => showTuning(kind, pitches) === params.get('from'))?.pitches ??
    standardPitches(kind);
  return (
    <Page>
      <PageHeading title="Tunings" />
      <nav className={styles.kinds} aria-label="Instrument">
        <ul>
          {BUILT_IN_KINDS.map(({ id, name }) => (
            <li key={id}>
              <Link to={`?kind=${id}`} aria-current={id === kind.id ? 'true' : undefined}>
                {name}
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      <section aria-labelledby="named">
        <div className={styles.head}>
          <h2 id="named">{`${kind.name} tunings`}</h2>
          {named.length > 1 ? (
            <div className={styles.from}>
              <SelectField
                label="Your strings stand in"
                value={showTuning(kind, from)}
                onChange={(event) =>
                  setParams({ kind: kind.id, from: event.target.value }, { replace: true })
                }
              >
                {named.map(({ pitches, names }) => {
                  const text = showTuning(kind, pitches);
                  return (
                    <option key={text} value={text}>
                      {[text, names[0]].filter(Boolean).join(', ')}
                    </option>
                  );
                })}
              </SelectField>
            </div>
          ) : null}
        </div>
        <NamedTunings kind={kind} from={from} circleId={circle.id} />
      </section>
      <TuningMatrix kind={kind} />
      <Safety />
      <div className={styles.usual}>
        <UsualSection
          key={kind.id}
          circleId={circle.id}
          kind={kind}
          mayChange={circle.may('circle.change')}
        />
      </div>
    </Page>
  );
}
