"use client";

import { useEffect, useState } from "react";
import { flushSync } from "react-dom";

/** Colours of the plots, by the names of the page's CSS variables: a canvas cannot read variables itself. */
const NAMES = [
  "paper",
  "sheet",
  "hairline",
  "edge",
  "ink",
  "ink-soft",
  "felt",
  "brass",
  "brass-fill",
  "band",
  "band-soft",
  "iron",
  "rust",
  "grid",
] as const;

export type PlotColours = Record<(typeof NAMES)[number], string> & { font: string };

/**
 * A probe element turns whatever the variable holds (a mix, a light-dark pair, another variable) into a colour
 * that a canvas understands.
 */
function readColours(): PlotColours {
  const probe = document.createElement("span");
  probe.style.display = "none";
  document.body.append(probe);
  const read = (name: string) => {
    probe.style.color = `var(--${name})`;
    return getComputedStyle(probe).color;
  };
  const entries = NAMES.map((name) => [name, read(name)]);
  const colours = {
    ...(Object.fromEntries(entries) as Record<(typeof NAMES)[number], string>),
    font: getComputedStyle(document.body).fontFamily || "sans-serif",
  };
  probe.remove();
  return colours;
}

/** Read again when the theme changes, by preference or by hand, and when the faces have arrived. */
export function usePlotColours(): PlotColours {
  const [colours, setColours] = useState(readColours);
  useEffect(() => {
    const update = () => setColours(readColours());
    const dark = matchMedia("(prefers-color-scheme: dark)");
    dark.addEventListener("change", update);
    // Printing takes its picture at once: the light colours must be drawn before it goes on.
    const print = matchMedia("print");
    const forPrint = () => flushSync(update);
    print.addEventListener("change", forPrint);
    const observer = new MutationObserver(update);
    observer.observe(document.documentElement, { attributeFilter: ["data-theme", "class", "style"] });
    let mounted = true;
    document.fonts?.ready.then(() => {
      if (mounted) update();
    });
    return () => {
      mounted = false;
      dark.removeEventListener("change", update);
      print.removeEventListener("change", forPrint);
      observer.disconnect();
    };
  }, []);
  return colours;
}
