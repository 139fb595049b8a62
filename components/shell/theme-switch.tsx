"use client";

import { useSyncExternalStore } from "react";
import { Segmented } from "../ui/segmented";
import { parseTheme, type Theme, themeCookie } from "./theme";

const listeners = new Set<() => void>();

function subscribe(listener: () => void) {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** The attribute the server wrote is the truth; the cookie only carries it to the next request. */
function chosenTheme(): Theme {
  return parseTheme(document.documentElement.dataset.theme);
}

function chooseTheme(theme: Theme) {
  const root = document.documentElement;
  if (theme === "system") delete root.dataset.theme;
  else root.dataset.theme = theme;
  const secure = window.location.protocol === "https:" ? "; Secure" : "";
  const age = theme === "system" ? 0 : 31_536_000;
  // biome-ignore lint/suspicious/noDocumentCookie: the cookie store API is missing in some browsers we serve
  document.cookie = `${themeCookie}=${theme}; Path=/; Max-Age=${age}; SameSite=Lax${secure}`;
  for (const listener of listeners) listener();
}

const themes = [
  { value: "system", label: "As device" },
  { value: "light", label: "Light" },
  { value: "dark", label: "Dark" },
] as const;

export function ThemeSwitch({ className }: { className?: string }) {
  const theme = useSyncExternalStore<Theme>(subscribe, chosenTheme, () => "system");
  return (
    <Segmented
      label="Paper and ink"
      hideLabel={false}
      options={themes}
      value={theme}
      onChange={chooseTheme}
      className={className}
    />
  );
}
