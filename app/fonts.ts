// The typefaces ship with the application. One call per subset, each with its own unicode-range, so that a browser fetches
// a subset only where a page uses it. next/font reads these calls at build time: every argument must be a literal.
import localFont from 'next/font/local';

const sourceSans = localFont({
  src: '../node_modules/@fontsource-variable/source-sans-3/files/source-sans-3-latin-wght-normal.woff2',
  variable: '--font-source-sans',
  weight: '200 900',
  display: 'swap',
  preload: true,
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0000-00FF, U+0131, U+0152-0153, U+02BB-02BC, U+02C6, U+02DA, U+02DC, U+0304, U+0308, U+0329, U+2000-206F, U+2074, U+20AC, U+2122, U+2190-2193, U+2202, U+2206, U+2211-2212, U+2215, U+221A, U+221E, U+2248, U+2260, U+2264-2265, U+FEFF, U+FFFD',
    },
  ],
});
const sourceSansExt = localFont({
  src: '../node_modules/@fontsource-variable/source-sans-3/files/source-sans-3-latin-ext-wght-normal.woff2',
  variable: '--font-source-sans-ext',
  weight: '200 900',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+02DD-02FF, U+0304, U+0308, U+0329, U+1D00-1DBF, U+1E00-1E9F, U+1EF2-1EFF, U+2020, U+2070-209F, U+20A0-20AB, U+20AD-20C0, U+2113, U+2150-215F, U+2C60-2C7F, U+A720-A7FF',
    },
  ],
});
const sourceSansGreek = localFont({
  src: '../node_modules/@fontsource-variable/source-sans-3/files/source-sans-3-greek-wght-normal.woff2',
  variable: '--font-source-sans-greek',
  weight: '200 900',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value: 'U+0370-0377, U+037A-037F, U+0384-038A, U+038C, U+038E-03A1, U+03A3-03FF',
    },
  ],
});
const literata = localFont({
  src: '../node_modules/@fontsource-variable/literata/files/literata-latin-wght-normal.woff2',
  variable: '--font-literata',
  weight: '200 900',
  display: 'swap',
  preload: true,
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0000-00FF, U+0131, U+0152-0153, U+02BB-02BC, U+02C6, U+02DA, U+02DC, U+0304, U+0308, U+0329, U+2000-206F, U+2074, U+20AC, U+2122, U+2190-2193, U+2202, U+2206, U+2211-2212, U+2215, U+221A, U+221E, U+2248, U+2260, U+2264-2265, U+FEFF, U+FFFD',
    },
  ],
});
const literataExt = localFont({
  src: '../node_modules/@fontsource-variable/literata/files/literata-latin-ext-wght-normal.woff2',
  variable: '--font-literata-ext',
  weight: '200 900',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+02DD-02FF, U+0304, U+0308, U+0329, U+1D00-1DBF, U+1E00-1E9F, U+1EF2-1EFF, U+2020, U+2070-209F, U+20A0-20AB, U+20AD-20C0, U+2113, U+2150-215F, U+2C60-2C7F, U+A720-A7FF',
    },
  ],
});
const literataGreek = localFont({
  src: '../node_modules/@fontsource-variable/literata/files/literata-greek-wght-normal.woff2',
  variable: '--font-literata-greek',
  weight: '200 900',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: 'unicode-range',
      value: 'U+0370-0377, U+037A-037F, U+0384-038A, U+038C, U+038E-03A1, U+03A3-03FF',
    },
  ],
});

/** Class names that define the font variables used in globals.css. */
export const fontVariables = [
  sourceSans,
  sourceSansExt,
  sourceSansGreek,
  literata,
  literataExt,
  literataGreek,
]
  .map((font) => font.variable)
  .join(' ');
