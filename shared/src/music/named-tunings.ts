/** A tuning that players know by a name; names are aliases, many to many: pitches decide. */
export interface NamedTuning {
  /** Spelled pitches, one per course. */
  readonly pitches: readonly string[];
  /** Trade names, the commonest first; may be none. */
  readonly names: readonly string[];
  /** Keys it serves, as players say it. */
  readonly keys?: string;
  /** Where it is from: a published source, `common practice` or `from memory`. */
  readonly provenance: string;
}

const CROSS = 'Wikipedia, "Cross tuning"';
const WAX = 'waxandwane.org/oldtime.html';
const FIDDLETAILS = 'fiddletails.com';
const BANJO_SOURCE = 'banjr.com/tunings.htm; Barnes & Mullins, "5-string banjo tunings"';
const PRACTICE = 'common practice';
const MEMORY = 'from memory';

function row(
  pitches: string,
  names: readonly string[],
  keys: string | undefined,
  provenance: string,
): NamedTuning {
  return { pitches: pitches.split(' '), names, ...(keys === undefined ? {} : { keys }), provenance };
}

/** By kind id; each kind's first is its standard tuning. */
export const NAMED_TUNINGS: Readonly<Record<string, readonly NamedTuning[]>> = {
  fiddle: [
    row('G3 D4 A4 E5', ['standard'], 'all', PRACTICE),
    row('A3 D4 A4 E5', ['high bass', 'old-timey D'], 'D, A mixolydian', `${CROSS}; ${WAX}`),
    row(
      'A3 E4 A4 E5',
      ['cross A', 'cross tuning', 'high bass, high counter', 'high bass'],
      'A',
      `${CROSS}; ${WAX}`,
    ),
    row('G3 D4 G4 D5', ['cross G', 'sawmill'], 'G', CROSS),
    row('G3 D4 A4 D5', ['gee-dad'], 'D, G', WAX),
    row('D3 D4 A4 D5', ['dee-dad', "dead man's"], 'D', WAX),
    row('A3 E4 A4 C#5', ['calico', 'open A'], 'A', `${WAX}; ${FIDDLETAILS}`),
    row('A3 E4 A4 D5', [], 'A, D', WAX),
    row('E3 D4 A4 E5', [], 'E modal', WAX),
    row('E3 E4 A4 E5', [], 'A, E', FIDDLETAILS),
    row('F3 C4 G4 D5', ['Cajun'], 'sounds a tone low', CROSS),
    row('G3 D4 G4 B4', ['open G'], 'G', CROSS),
    row('A3 D4 A4 D5', [], 'D', MEMORY),
  ],
  banjo: [
    row('G4 D3 G3 B3 D4', ['open G'], 'G; A with capo 2', BANJO_SOURCE),
    row('G4 C3 G3 C4 D4', ['double C'], 'C; D with capo 2', BANJO_SOURCE),
    row('G4 C3 G3 B3 D4', ['standard C', 'drop C'], 'C; D with capo 2', BANJO_SOURCE),
    row(
      'G4 D3 G3 C4 D4',
      ['sawmill', 'G modal', 'mountain minor'],
      'G modal; A modal with capo 2',
      BANJO_SOURCE,
    ),
    row('F#4 D3 F#3 A3 D4', ['open D', 'graveyard', 'Reuben'], 'D', `${BANJO_SOURCE}; "Reuben" ${MEMORY}`),
    row('A4 D3 F#3 A3 D4', ['open D', 'graveyard'], 'D', BANJO_SOURCE),
    row('G4 D3 G3 Bb3 D4', ['G minor'], 'G minor', MEMORY),
  ],
  guitar: [
    row('E2 A2 D3 G3 B3 E4', ['standard'], undefined, PRACTICE),
    row('D2 A2 D3 G3 B3 E4', ['drop D'], undefined, PRACTICE),
    row('D2 A2 D3 G3 A3 D4', [], undefined, PRACTICE),
  ],
  mandolin: [row('G3 D4 A4 E5', ['standard'], undefined, PRACTICE)],
  'tenor-banjo': [
    row('G2 D3 A3 E4', ['standard', 'Irish'], undefined, PRACTICE),
    row('C3 G3 D4 A4', ['standard C'], undefined, PRACTICE),
  ],
  bouzouki: [row('G2 D3 A3 D4', ['standard', 'Irish'], undefined, MEMORY)],
  ukulele: [row('G4 C4 E4 A4', ['standard'], undefined, PRACTICE)],
  dulcimer: [
    row('D3 A3 D4', ['DAd'], undefined, MEMORY),
    row('D3 A3 A3', ['DAA'], undefined, MEMORY),
    row('D3 A3 C4', ['DAC'], undefined, MEMORY),
    row('D3 A3 G3', ['DAG'], undefined, MEMORY),
  ],
  bass: [row('E1 A1 D2 G2', ['standard'], undefined, PRACTICE)],
};
