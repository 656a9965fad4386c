import { SETTINGS, type SearchSettings } from '../../src/ordering/engine/search';

/** Hardly any looking ahead, and a bound that sees next to nothing: the sweeps must do it all. */
export const BARE: SearchSettings = {
  ...SETTINGS,
  closerWidth: 1,
  bounds: [
    { limits: { joints: 400, whole: 1, together: 1, apart: 1 }, width: 1, improveSteps: 0, share: Infinity },
  ],
  lookSteps: 1,
  cheapSweep: 0,
};
