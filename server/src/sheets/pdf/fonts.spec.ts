import { printable } from './fonts';

describe('what the typeface can draw', () => {
  it.each([
    // As it is: Latin with all its accents, Greek, Cyrillic, typographic marks.
    ['Dvořák’s “Őrség” – ½', 'Dvořák’s “Őrség” – ½'],
    ['Щедрик, Χορός', 'Щедрик, Χορός'],
    ['© ™', '© ™'],
    // Accents that stand apart are put together.
    ['Kaj de\u0308r Bach', 'Kaj dër Bach'],
    // Signs that players write with a key of their keyboard.
    ['B♭ and F♯', 'Bb and F#'],
    // Emoji go, with their skins, joiners and flags, and leave no gap.
    ['Fire 🔥 on the 🏔️ Hill', 'Fire on the Hill'],
    ['👩🏽‍🚒🇨🇿', ''],
    // What is lacking shows that it is.
    ['東京 Stomp', '□□ Stomp'],
    ['שלום', '□□□□'],
    // Line ends and tabs are spaces.
    ['one\n\ttwo', 'one two'],
  ])('writes %j as %j', (text, drawn) => {
    expect(printable(text)).toBe(drawn);
  });
});
