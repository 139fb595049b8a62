import type { Config } from "tailwindcss";

/**
 * Colours are the custom properties of app/globals.css, so light and dark need no `dark:` classes.
 * Sizes are named by their pixels: `text-14` is 14 on a 20 pixel line.
 */
const config: Config = {
  content: [],
  theme: {
    colors: {
      inherit: "inherit",
      transparent: "transparent",
      current: "currentColor",
      paper: "var(--paper)",
      sheet: "var(--sheet)",
      cover: "var(--cover)",
      hairline: "var(--hairline)",
      edge: "var(--edge)",
      ink: "var(--ink)",
      "ink-soft": "var(--ink-soft)",
      felt: "var(--felt)",
      "felt-fill": "var(--felt-fill)",
      "felt-press": "var(--felt-press)",
      "felt-wash": "var(--felt-wash)",
      "on-felt": "var(--on-felt)",
      brass: "var(--brass)",
      "brass-fill": "var(--brass-fill)",
      "brass-wash": "var(--brass-wash)",
      iron: "var(--iron)",
      "iron-wash": "var(--iron-wash)",
      spruce: "var(--spruce)",
      "spruce-wash": "var(--spruce-wash)",
      rust: "var(--rust)",
      "rust-wash": "var(--rust-wash)",
      band: "var(--band)",
      "band-soft": "var(--band-soft)",
      grid: "var(--grid)",
      "key-white": "var(--key-white)",
      "key-line": "var(--key-line)",
      "key-black": "var(--key-black)",
      "key-rust": "var(--key-rust)",
      "key-brass": "var(--key-brass)",
    },
    fontFamily: { sans: "var(--sans)", serif: "var(--serif)" },
    fontSize: {
      "12": ["12px", "16px"],
      "14": ["14px", "20px"],
      "16": ["16px", "24px"],
      "19": ["19px", "24px"],
      "23": ["23px", "28px"],
      "28": ["28px", "32px"],
      "33": ["33px", "40px"],
      "40": ["40px", "48px"],
    },
    fontWeight: { normal: "400", text: "450", medium: "500", semibold: "600" },
    borderRadius: { none: "0", sm: "4px", DEFAULT: "6px", full: "9999px" },
    boxShadow: { none: "none", float: "var(--float)" },
    screens: { sm: "640px", lg: "1024px", xl: "1280px", "2xl": "1680px" },
  },
};

export default config;
