import type { CreateRack, Rack } from '@pegwell/shared/contract/racks';
import { useQueryClient } from '@tanstack/react-query';
import { sentenceOf } from '../../../lib/problem';
import { useSay } from '../../../ui/status';
import { createRack, putRack, racksKey, removeRack } from '../api/racks';
import { toSend, valuesOf } from '../rack-form-values';

/** Adds, changes and takes out players' instruments; after each the plans are asked for again. */
export function useRackChanges(sessionId: string) {
  const queries = useQueryClient();
  const say = useSay();
  const renew = () => queries.invalidateQueries({ queryKey: racksKey(sessionId) });

  const save = async (rack: Rack | null, content: CreateRack): Promise<Rack> => {
    try {
      if (rack) return await putRack(sessionId, rack.id, { version: rack.version, ...content });
      return await createRack(sessionId, content);
    } finally {
      // Also where somebody else was first: what is sent next is then against theirs.
      await renew();
    }
  };

  const bringBack = async (rack: Rack): Promise<void> => {
    await createRack(sessionId, toSend(valuesOf(rack)));
    await renew();
  };

  const remove = async (rack: Rack): Promise<void> => {
    try {
      await removeRack(sessionId, rack.id);
      say(`${rack.player} is taken out.`, {
        label: 'Undo',
        onPress: () => void bringBack(rack).catch((error: unknown) => say(sentenceOf(error))),
      });
    } catch (error) {
      say(sentenceOf(error));
    }
    await renew();
  };

  return { save, remove };
}
