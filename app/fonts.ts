import localFont from 'next/font/local';

/*
 * Each family comes in files by script, each fetched only when one of its characters is on the page. The ranges are
 * those that the files were cut to. Only the Latin ones are worth loading ahead, and only they carry the metric-matched
 * stand-in that keeps the page still while they load.
 */

const commissioner = localFont({
  src: '../fonts/commissioner-latin.woff2',
  weight: '100 900',
  style: 'normal',
  display: 'swap',
  variable: '--font-commissioner',
  adjustFontFallback: 'Arial',
});

const commissionerExtended = localFont({
  src: '../fonts/commissioner-latin-ext.woff2',
  weight: '100 900',
  style: 'normal',
  display: 'swap',
  preload: false,
  variable: '--font-commissioner-ext',
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+02DD-02FF, U+1D00-1DBF, U+1E00-1E9F, U+1EF2-1EFF, U+2020, U+20A0-20AB, U+20AD-20C0, U+2113',
    },
  ],
});

const commissionerGreek = localFont({
  src: '../fonts/commissioner-greek.woff2',
  weight: '100 900',
  style: 'normal',
  display: 'swap',
  preload: false,
  variable: '--font-commissioner-greek',
  adjustFontFallback: false,
  declarations: [
    { prop: 'unicode-range', value: 'U+0370-0377, U+037A-037F, U+0384-038A, U+038C, U+038E-03A1, U+03A3-03FF' },
  ],
});

const figures = localFont({
  src: '../fonts/jetbrains-mono-latin.woff2',
  weight: '100 800',
  style: 'normal',
  display: 'swap',
  preload: true,
  variable: '--font-figures',
  adjustFontFallback: false,
  fallback: ['ui-monospace', 'monospace'],
});

const figuresExtended = localFont({
  src: '../fonts/jetbrains-mono-latin-ext.woff2',
  weight: '100 800',
  style: 'normal',
  display: 'swap',
  preload: false,
  variable: '--font-figures-ext',
  adjustFontFallback: false,
  declarations: [
    { prop: 'unicode-range', value: 'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+02DD-02FF, U+1E00-1E9F, U+20A0-20AB, U+20AD-20C0' },
  ],
});

const figuresGreek = localFont({
  src: '../fonts/jetbrains-mono-greek.woff2',
  weight: '100 800',
  style: 'normal',
  display: 'swap',
  preload: false,
  variable: '--font-figures-greek',
  adjustFontFallback: false,
  declarations: [
    { prop: 'unicode-range', value: 'U+0370-0377, U+037A-037F, U+0384-038A, U+038C, U+038E-03A1, U+03A3-03FF' },
  ],
});

/** The symbols that neither family has: ∠ √ ∞ ≈ ≤ ≥ → ∥ ⌀ and their like, and the narrow spaces before a unit. */
const math = localFont({
  src: '../fonts/noto-sans-math-symbols.woff2',
  weight: '400',
  style: 'normal',
  display: 'swap',
  preload: false,
  variable: '--font-math',
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+2009, U+202F, U+2190, U+2192, U+2194, U+21C4, U+21CC, U+21D2, U+21D4, U+21E7, U+2111, U+211C, U+2202, U+2206-2208, U+2211, U+2213, U+2218-221A, U+221D-2222, U+2225, U+222B, U+2248, U+2260-2261, U+2264-2265, U+226A-226B, U+2300, U+23CE, U+25A1, U+25B3, U+25B8, U+25CB, U+25CF, U+22A5, U+22C5, U+2713, U+27C2',
    },
  ],
});

/** The classes that put every family's variable on the root element. */
export const fontVariables = [
  commissioner,
  commissionerExtended,
  commissionerGreek,
  figures,
  figuresExtended,
  figuresGreek,
  math,
]
  .map((font) => font.variable)
  .join(' ');
