import type { ImportProgress, ImportReport } from '@pegwell/shared/contract/tunes';
import { api } from '../../../lib/api';

interface ImportOptions {
  readonly dryRun: boolean;
  /** A new UUID under which the writing can be watched. */
  readonly progress?: string;
}

/** A dry run says what an import would do and writes nothing. */
export function importTunes(circleId: string, file: File, options: ImportOptions) {
  const body = new FormData();
  body.append('file', file);
  return api.post<ImportReport>(`/circles/${circleId}/tunes/import`, body, { query: { ...options } });
}

/** How many rows are written so far; 404 before the first is. */
export const getImportProgress = (circleId: string, importId: string, signal?: AbortSignal) =>
  api.get<ImportProgress>(`/circles/${circleId}/tunes/imports/${importId}`, signal ? { signal } : {});
