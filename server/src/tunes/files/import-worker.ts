import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import type { Parsed } from '@pegwell/shared/music/parsed';
import type { StoredTune } from '../tune-content';
import type { FileTune } from './file-tune';
import { planImport, type ImportPlan } from './plan-import';
import { readFile, type ReadFile, type Upload } from './read-file';

/** What the thread is handed, and hands back: all of it can be cloned. */
export type ImportTask =
  | { readonly what: 'begin' }
  | { readonly what: 'read'; readonly upload: Upload }
  | {
      readonly what: 'plan';
      readonly tunes: readonly FileTune[];
      readonly library: readonly StoredTune[];
      readonly choices: readonly ImportChoice[];
    };

/** Runs in the importing thread. `begin` does nothing: who waits for it knows that the thread is up. */
export default function run(task: ImportTask): Parsed<ReadFile> | ImportPlan | null {
  if (task.what === 'read') return readFile(task.upload);
  return task.what === 'plan' ? planImport(task.tunes, task.library, task.choices) : null;
}
