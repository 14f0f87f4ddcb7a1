/** The units that a field or a reading may have; the empty one is for a pure number (a ratio, a turns count). */
export type Unit =
  'Ω' | 'F' | 'H' | 'V' | 'A' | 'Hz' | 'rad/s' | '°' | 'W' | 'var' | 'VA' | 'S' | 's' | 'J' | 'dB' | '';

interface UnitWords {
  /** What a value in this unit is, with its article, as used in sentences. */
  readonly quantity: string;
  /** Whether SI prefixes are used with it. Degrees, decibels and pure numbers go without. */
  readonly prefixes: boolean;
  /** What people type for it besides the symbol itself; matched exactly, case and all. */
  readonly spellings: readonly string[];
}

/** U+2126 OHM SIGN is a different character from U+03A9 Greek capital omega; both are typed, the latter is shown. */
const OHM_SIGN = '\u2126';

const UNIT_WORDS: Readonly<Record<Unit, UnitWords>> = {
  Ω: { quantity: 'a resistance', prefixes: true, spellings: ['Ω', OHM_SIGN, 'ohm', 'Ohm', 'ohms', 'Ohms', 'OHM'] },
  F: { quantity: 'a capacitance', prefixes: true, spellings: ['F', 'farad', 'Farad', 'farads'] },
  H: { quantity: 'an inductance', prefixes: true, spellings: ['H', 'henry', 'Henry', 'henries'] },
  V: { quantity: 'a voltage', prefixes: true, spellings: ['V', 'volt', 'Volt', 'volts', 'Volts'] },
  A: { quantity: 'a current', prefixes: true, spellings: ['A', 'amp', 'Amp', 'amps', 'ampere', 'amperes'] },
  Hz: { quantity: 'a frequency', prefixes: true, spellings: ['Hz', 'hz', 'HZ', 'hertz', 'Hertz'] },
  'rad/s': {
    quantity: 'an angular frequency',
    prefixes: true,
    spellings: ['rad/s', 'rad/sec', 'rad·s⁻¹', '/s', 's⁻¹'],
  },
  '°': { quantity: 'an angle', prefixes: false, spellings: ['°', 'º', 'deg', 'degree', 'degrees'] },
  W: { quantity: 'an active power', prefixes: true, spellings: ['W', 'watt', 'Watt', 'watts'] },
  var: { quantity: 'a reactive power', prefixes: true, spellings: ['var', 'VAr', 'VAR', 'Var'] },
  VA: { quantity: 'an apparent power', prefixes: true, spellings: ['VA', 'va'] },
  S: { quantity: 'a conductance', prefixes: true, spellings: ['S', 'siemens', 'Siemens'] },
  s: { quantity: 'a time', prefixes: true, spellings: ['s', 'sec', 'second', 'seconds'] },
  J: { quantity: 'an energy', prefixes: true, spellings: ['J', 'joule', 'Joule', 'joules'] },
  dB: { quantity: 'a level', prefixes: false, spellings: ['dB', 'db', 'DB'] },
  '': { quantity: 'a plain number', prefixes: true, spellings: [] },
};

/** Every unit, in the order of the type. */
export const UNITS = Object.keys(UNIT_WORDS) as readonly Unit[];

/** What a value in the unit is, with its article: "a resistance", "an inductance". */
export function quantityName(unit: Unit): string {
  return UNIT_WORDS[unit].quantity;
}

/** Whether values in the unit carry SI prefixes; degrees and decibels do not. */
export function takesPrefixes(unit: Unit): boolean {
  return UNIT_WORDS[unit].prefixes;
}

/** The unit that a spelling stands for, if it stands for one. `S` is siemens and `s` is seconds: case counts. */
export function unitOfSpelling(text: string): Unit | undefined {
  return UNITS.find((unit) => UNIT_WORDS[unit].spellings.includes(text));
}
