import localFont from "next/font/local";

/*
 * Atkinson Hyperlegible Next and Mono, SIL Open Font License (public/licences). The latin-ext files are asked for only
 * when a page holds a letter of theirs, so they are not preloaded and come after the latin ones in the family list.
 */
const words = localFont({
  src: [
    {
      path: "../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2",
      weight: "200 800",
      style: "normal",
    },
    {
      path: "../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-italic.woff2",
      weight: "200 800",
      style: "italic",
    },
  ],
  variable: "--font-words",
  display: "swap",
  adjustFontFallback: false,
});

const wordsExt = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2",
  weight: "200 800",
  variable: "--font-words-ext",
  display: "swap",
  adjustFontFallback: false,
  preload: false,
});

const figures = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2",
  weight: "200 800",
  variable: "--font-figures",
  display: "swap",
  adjustFontFallback: false,
});

const figuresExt = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-ext-wght-normal.woff2",
  weight: "200 800",
  variable: "--font-figures-ext",
  display: "swap",
  adjustFontFallback: false,
  preload: false,
});

/** Sets the families' CSS variables on the root element. */
export const fontClass = [words, wordsExt, figures, figuresExt].map((font) => font.variable).join(" ");
