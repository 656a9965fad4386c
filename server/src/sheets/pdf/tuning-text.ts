import type { ContentText } from 'pdfmake/interfaces';
import type { SheetTuning } from '../sheet';
import { HEAVY, INK, INK_2 } from './ink';

/** A tuning's letters, heavy and widely tracked, with the capo behind and a mark where it is not stated. */
export function tuningText(tuning: SheetTuning, fontSize: number): ContentText {
  const { letters, capo, standing } = tuning;
  if (standing === 'past') return quiet('played', fontSize);
  if (standing === 'sits out') return quiet('sits out', fontSize);
  if (letters === '') return quiet('as you like', fontSize);
  const stands = standing === 'as it stands';
  const mark = standing === 'assumed' ? '*' : stands ? ')' : '';
  const colour = stands ? INK_2 : INK;
  return {
    fontSize,
    text: [
      ...(stands ? [{ text: '(', color: INK_2, fontSize }] : []),
      { text: letters, ...tracked(letters, fontSize), color: colour, fontSize, noWrap: true },
      ...(capo > 0 ? [{ text: ` capo ${capo}`, color: INK_2, fontSize }] : []),
      ...(mark === '' ? [] : [{ text: mark, color: INK_2, fontSize }]),
    ],
  };
}

/** A full form has its own spaces: `D3 A3 G3`. */
function tracked(letters: string, fontSize: number) {
  const characterSpacing = letters.includes(' ') ? 0.2 : fontSize * 0.14;
  return { font: HEAVY, characterSpacing };
}

function quiet(text: string, fontSize: number): ContentText {
  return { text, color: INK_2, fontSize: fontSize - 0.5 };
}
