import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import type {
  ImportProgress,
  ImportReport,
  ImportUndone,
  RecentImports,
} from '@pegwell/shared/contract/tunes';
import { api } from '../../../lib/api';

export interface ImportSource {
  readonly file: File;
  /** Words from a text field: what they are is for the server to tell. */
  readonly pasted: boolean;
}

interface ImportOptions {
  readonly dryRun: boolean;
  /** A new UUID under which the writing can be watched, and asked for again. */
  readonly progress?: string;
}

/** A dry run says what an import would do and writes nothing. */
export function importTunes(
  circleId: string,
  { file, pasted }: ImportSource,
  options: ImportOptions,
  choices: readonly ImportChoice[] = [],
) {
  const body = new FormData();
  if (choices.length > 0) body.append('choices', JSON.stringify(choices));
  body.append('file', file);
  return api.post<ImportReport>(`/circles/${circleId}/tunes/import`, body, {
    query: { ...options, ...(pasted && { pasted }) },
  });
}

export const undoImport = (circleId: string, importId: string) =>
  api.post<ImportUndone>(`/circles/${circleId}/tunes/imports/${importId}/undo`);

export const recentImportsKey = (circleId: string) => ['imports', circleId] as const;

export const getRecentImports = (circleId: string, signal?: AbortSignal) =>
  api.get<RecentImports>(`/circles/${circleId}/tunes/imports`, signal ? { signal } : {});

/** How many rows are written so far; 404 before the first is. */
export const getImportProgress = (circleId: string, importId: string, signal?: AbortSignal) =>
  api.get<ImportProgress>(`/circles/${circleId}/tunes/imports/${importId}`, signal ? { signal } : {});
