import { useMutation, useQueryClient } from '@tanstack/react-query';
import { sentenceOf } from '../../../lib/problem';
import { undoImport } from '../api/import-tunes';
import { libraryKey } from '../api/tune-list';

/** An import taken back as one step. */
export function useUndoImport(circleId: string, importId: string) {
  const client = useQueryClient();
  const undoing = useMutation({
    mutationFn: () => undoImport(circleId, importId),
    onSuccess: () => client.invalidateQueries({ queryKey: libraryKey(circleId) }),
  });
  return {
    undo: () => {
      if (!undoing.isPending) undoing.mutate();
    },
    busy: undoing.isPending,
    /** What it did. */
    undone: undoing.data,
    error: undoing.error ? sentenceOf(undoing.error) : undefined,
  };
}
