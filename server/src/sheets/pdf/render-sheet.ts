import pdfmake from 'pdfmake';
import type { Sheet } from '../sheet';
import { CLOSE, ROOMY, type Density } from './density';
import { FONT_FILES, FONTS, printable } from './fonts';
import { sheetDocument } from './sheet-document';
import type { Paper } from '@pegwell/shared/contract/sheets';

pdfmake.setFonts(FONTS);
// The typeface is all that a sheet is made from: nothing else is read, and nothing fetched.
pdfmake.setLocalAccessPolicy((path) => FONT_FILES.includes(path));
pdfmake.setUrlAccessPolicy(() => false);

/** More pages than this are set closer, where that saves one: a sheet lies on a music stand. */
const COMFORTABLE_PAGES = 2;

/** Draws the sheet as a PDF. */
export async function renderSheet(sheet: Sheet, paper: Paper): Promise<Buffer> {
  const plain = inType(sheet);
  const roomy = await draw(plain, paper, ROOMY);
  if (roomy.pages <= COMFORTABLE_PAGES) return roomy.bytes;
  const close = await draw(plain, paper, CLOSE);
  return close.pages < roomy.pages ? close.bytes : roomy.bytes;
}

async function draw(sheet: Sheet, paper: Paper, density: Density) {
  let pages = 1;
  const definition = sheetDocument(sheet, paper, density, (count) => {
    pages = count;
  });
  return { bytes: await pdfmake.createPdf(definition).getBuffer(), pages };
}

/** Everything that people wrote, as the typeface can draw it. */
function inType(sheet: Sheet): Sheet {
  const orNull = (text: string | null) => text && printable(text);
  return {
    ...sheet,
    title: printable(sheet.title) || 'An evening',
    place: orNull(sheet.place),
    notes: orNull(sheet.notes),
    sets: sheet.sets.map((set) => ({
      title: printable(set.title),
      entries: set.entries.map((entry) => ({
        ...entry,
        title: entry.title && (printable(entry.title) || `Number ${entry.number}`),
        key: printable(entry.key),
        notes: orNull(entry.notes),
      })),
    })),
  };
}
