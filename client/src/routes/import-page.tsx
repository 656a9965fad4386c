import { Navigate } from 'react-router-dom';
import { exportUrl } from '../features/tunes/api/tune-list';
import { ImportPreview } from '../features/tunes/components/import-preview';
import { ImportProgress } from '../features/tunes/components/import-progress';
import { ImportUndo } from '../features/tunes/components/import-undo';
import { PasteField } from '../features/tunes/components/paste-field';
import { RecentImports } from '../features/tunes/components/recent-imports';
import { useImport } from '../features/tunes/hooks/use-import';
import { countWrites } from '../features/tunes/import-choices';
import { count, grouped } from '../lib/format';
import { BackLink } from '../ui/back-link';
import { Button, LinkButton } from '../ui/button';
import { FileField } from '../ui/file-field';
import { Page, PageHeading } from '../ui/page';
import { Loading } from '../ui/states';
import { useSay } from '../ui/status';
import styles from './import-page.module.css';
import { useCircle } from './use-circle';

/** A library from a file: chosen, looked at line by line, written. */
export function ImportPage() {
  const circle = useCircle();
  const say = useSay();
  const tunesPath = `/c/${circle.id}/tunes`;
  const it = useImport(circle.id, ({ created, updated }) =>
    say(`Imported: ${grouped(created)} added, ${grouped(updated)} changed.`),
  );
  if (!circle.may('tunes.change')) return <Navigate to={tunesPath} replace />;
  const { preview, done, file } = it;
  const writes = preview ? countWrites(it.choices, preview) : 0;
  return (
    <Page narrow>
      <BackLink to={tunesPath}>Tunes</BackLink>
      <PageHeading
        title="Import tunes"
        about="Nothing is written until you have seen what will become of every line."
      />
      <FileField
        label={file ? 'Choose another file' : 'Choose a file'}
        accept=".csv,.abc"
        file={file}
        error={it.pasted ? undefined : it.error}
        disabled={it.progressId !== null}
        onFile={(chosen) => it.choose({ file: chosen, pasted: false })}
        hint="A .csv or .abc file, at most 10 MB."
      />
      <div className={styles.paste}>
        <PasteField
          error={it.pasted ? it.error : undefined}
          busy={it.reading && it.pasted}
          disabled={it.progressId !== null}
          onPaste={(text) => it.choose({ file: new File([text], 'pasted'), pasted: true })}
        />
      </div>
      {it.failedToWrite ? (
        <p className={styles.after}>
          Pegwell keeps all of a file or nothing of it. Look in the library before you try again.
        </p>
      ) : null}
      {it.reading ? <Loading what="the file" /> : null}
      {preview && !it.reading ? (
        <section className={styles.result} aria-label={done ? 'What was imported' : 'What will become of it'}>
          {it.progressId ? (
            <ImportProgress circleId={circle.id} importId={it.progressId} expected={writes} lost={it.lost} />
          ) : done ? (
            <div className={styles.do}>
              <p className={styles.done}>
                {`${grouped(done.created)} added, ${grouped(done.updated)} changed, ${grouped(done.unchanged)} unchanged, ${grouped(done.skipped)} left out.`}
              </p>
              <LinkButton to={tunesPath}>To the tunes</LinkButton>
              {done.importId ? <ImportUndo circleId={circle.id} importId={done.importId} /> : null}
            </div>
          ) : (
            <div className={styles.do}>
              {writes > 0 ? (
                <Button onClick={it.write}>{`Import ${count(writes, 'tune')}`}</Button>
              ) : (
                <p className={styles.done}>Nothing here would change the library.</p>
              )}
            </div>
          )}
          {isGuessed(preview.encoding) ? (
            <p className={styles.encoding}>
              This file is not Unicode; it was read as {preview.encoding}. See whether accents are right.
            </p>
          ) : null}
          <ImportPreview
            key={done ? 'done' : it.round}
            report={done ?? preview}
            tense={done ? 'done' : 'plan'}
            choices={it.choices}
            {...(!done && !it.progressId && { onChoose: it.setChoices })}
          />
        </section>
      ) : (
        <Help circleId={circle.id} timeZone={circle.timeZone} />
      )}
    </Page>
  );
}

/** Unicode says itself what it is; everything else was told by looking at it. */
const isGuessed = (encoding: string) => !encoding.startsWith('utf-');

/** What a file looks like; stands there until one is read. */
function Help({ circleId, timeZone }: { readonly circleId: string; readonly timeZone: string }) {
  return (
    <div className={styles.help}>
      <RecentImports circleId={circleId} timeZone={timeZone} />
      <h2>A spreadsheet, saved as CSV</h2>
      <p>
        One tune a row, column names in the first: <code>title</code> and <code>key</code>, and where you have
        them <code>mode</code>, <code>rhythm</code>, <code>parts</code>, <code>composer</code>,{' '}
        <code>source</code>, <code>notes</code>. Tunings have a column per instrument, as <code>fiddle</code>{' '}
        or <code>banjo</code>: <code>AEAE or GDAE</code>, <code>gDGBD capo 2</code>, or <code>any</code> where
        nobody retunes for it. Without column names the keys are looked for, and the titles beside them.
      </p>
      <p>
        <a href="/example-tunes.csv" download>
          Take an example to fill in
        </a>
      </p>
      <h2>ABC notation</h2>
      <p>
        Titles, keys and rhythms are read from the header of each tune. Tunings stand in it as{' '}
        <code>%%pegwell-tuning fiddle AEAE</code>. Those in notes or titles are found, and taken if you say
        so.
      </p>
      <h2>Once more</h2>
      <p>
        A tune that is in the library already is changed, not doubled: it is found by its title, key and mode.
        Empty cells leave what is there. To change many at once, take the library as{' '}
        <a href={exportUrl(circleId, 'csv')}>CSV</a> or <a href={exportUrl(circleId, 'abc')}>ABC</a>, change
        it and bring it back.
      </p>
    </div>
  );
}
