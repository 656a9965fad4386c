import type { Tune } from '@pegwell/shared/contract/tunes';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { sentenceOf } from '../../../lib/problem';
import { useSay } from '../../../ui/status';
import { removeTune, restoreTune } from '../api/tune';
import { libraryKey } from '../api/tune-list';

/** Takes a tune out of the library at once, with the way back said beside it. */
export function useRemoveTune(circleId: string, onRemoved: () => void) {
  const client = useQueryClient();
  const say = useSay();
  const renew = () => client.invalidateQueries({ queryKey: libraryKey(circleId) });
  const restore = useMutation({
    mutationFn: (tune: Tune) => restoreTune(circleId, tune.id),
    onSuccess: async (tune) => {
      await renew();
      say(`“${tune.title}” is back.`);
    },
    onError: (error) => say(sentenceOf(error)),
  });
  return useMutation({
    mutationFn: (tune: Tune) => removeTune(circleId, tune.id),
    onSuccess: async (_, tune) => {
      onRemoved();
      say(`“${tune.title}” is out of the library. Evenings that have it keep it.`, {
        label: 'Undo',
        onPress: () => restore.mutate(tune),
      });
      await renew();
    },
    onError: (error) => say(sentenceOf(error)),
  });
}
