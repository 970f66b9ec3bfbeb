import localFont from "next/font/local";

// The Latin file carries every page; the Latin Extended one is fetched only when a name needs it
// (unicode-range). The ranges are those the font files were cut to.

export const serif = localFont({
  src: [
    { path: "./eb-garamond/eb-garamond-latin-wght-normal.woff2", weight: "400 800", style: "normal" },
    { path: "./eb-garamond/eb-garamond-latin-wght-italic.woff2", weight: "400 800", style: "italic" },
  ],
  variable: "--font-garamond",
  display: "swap",
  adjustFontFallback: "Times New Roman",
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0000-00FF,U+0131,U+0152-0153,U+02BB-02BC,U+02C6,U+02DA,U+02DC,U+0304,U+0308,U+0329,U+2000-206F,U+20AC,U+2122,U+2191,U+2193,U+2212,U+2215,U+FEFF,U+FFFD",
    },
  ],
});

export const serifExt = localFont({
  src: [
    {
      path: "./eb-garamond/eb-garamond-latin-ext-wght-normal.woff2",
      weight: "400 800",
      style: "normal",
    },
    {
      path: "./eb-garamond/eb-garamond-latin-ext-wght-italic.woff2",
      weight: "400 800",
      style: "italic",
    },
  ],
  variable: "--font-garamond-ext",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF",
    },
  ],
});

export const sans = localFont({
  src: "./atkinson-hyperlegible-next/atkinson-hyperlegible-next-latin-wght-normal.woff2",
  weight: "200 800",
  style: "normal",
  variable: "--font-atkinson",
  display: "swap",
  adjustFontFallback: "Arial",
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0000-00FF,U+0131,U+0152-0153,U+02BB-02BC,U+02C6,U+02DA,U+02DC,U+0304,U+0308,U+0329,U+2000-206F,U+20AC,U+2122,U+2191,U+2193,U+2212,U+2215,U+FEFF,U+FFFD",
    },
  ],
});

export const sansExt = localFont({
  src: "./atkinson-hyperlegible-next/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2",
  weight: "200 800",
  style: "normal",
  variable: "--font-atkinson-ext",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF",
    },
  ],
});

/** Class names that define the four font variables; put them on `<html>`. */
export const fontVariables = [serif, serifExt, sans, sansExt].map((f) => f.variable).join(" ");
