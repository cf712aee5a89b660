import type { Config } from "tailwindcss";

/** Every colour is a CSS variable, so that paper and microfiche need no class of their own. */
const config = {
  content: ["./app/**/*.{ts,tsx}", "./components/**/*.{ts,tsx}"],
  theme: {
    extend: {
      colors: {
        desk: "var(--desk)",
        paper: "var(--paper)",
        bar: "var(--bar)",
        rule: "var(--rule)",
        ink: "var(--ink)",
        soft: "var(--soft)",
        ribbon: "var(--ribbon)",
        carbon: "var(--carbon)",
        leaf: "var(--leaf)",
        graph: "var(--graph)",
        hole: "var(--hole)",
      },
      fontFamily: {
        words: "var(--words)",
        figures: "var(--figures)",
      },
      screens: {
        // The edges with their holes need this much; below it the sheet fills the screen.
        sheet: "45rem",
      },
    },
  },
} satisfies Config;

export default config;
