import fc from 'fast-check';
import { quoteFormula, unquoteFormula } from './formula-quote';

// Signs that begin a formula in spreadsheets: OWASP, "CSV injection".
describe('formulas in cells', () => {
  it.each(['=1+1', '+1', '-1', '@SUM(A1)', '\tx', '\rx', "'=1", '＝1'])('precedes %j by a quote', (cell) => {
    expect(quoteFormula(cell)).toBe(`'${cell}`);
  });

  it.each(["'Tis the Season", 'A=B', '', "'", 'GDAE'])('leaves %j as it is, both ways', (cell) => {
    expect(quoteFormula(cell)).toBe(cell);
    expect(unquoteFormula(cell)).toBe(cell);
  });

  it('takes the quote off again, whatever the cell', () => {
    const cells = fc.oneof(fc.string(), fc.string({ unit: fc.constantFrom("'", '=', '-', 'x', '\t') }));
    fc.assert(
      fc.property(cells, (cell) => {
        expect(unquoteFormula(quoteFormula(cell))).toBe(cell);
        expect(quoteFormula(cell)).not.toMatch(/^[=+\-@\t\r\n]/);
      }),
    );
  });
});
