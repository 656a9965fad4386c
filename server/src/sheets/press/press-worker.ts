import type { Paper } from '@pegwell/shared/contract/sheets';
import { renderSheet } from '../pdf/render-sheet';
import type { Sheet } from '../sheet';

/** What the thread is handed: words and numbers, all of which can be cloned. */
export interface PressTask {
  readonly sheet: Sheet;
  readonly paper: Paper;
}

/** Runs in the drawing thread. */
export default function run({ sheet, paper }: PressTask): Promise<Uint8Array> {
  return renderSheet(sheet, paper);
}
