import { act, type ReactNode } from "react";
import { createRoot, type Root } from "react-dom/client";
import { afterEach, beforeEach } from "vitest";

/** A page's part drawn into a document, a fresh one for each test; with the hands that use it. */
export function mounted() {
  let root: Root;
  let host: HTMLElement;

  beforeEach(() => {
    Reflect.set(globalThis, "IS_REACT_ACT_ENVIRONMENT", true);
    host = document.createElement("div");
    document.body.append(host);
    root = createRoot(host);
  });

  afterEach(() => {
    act(() => root.unmount());
    host.remove();
  });

  const settle = () => act(async () => void (await new Promise((done) => setTimeout(done, 20))));

  function button(words: string): HTMLButtonElement | undefined {
    return [...host.querySelectorAll("button")].find(({ textContent }) => textContent === words);
  }

  return {
    settle,
    button,
    host: () => host,
    show: (what: ReactNode) => act(async () => root.render(what)),
    field(selector: string): HTMLInputElement {
      const found = host.querySelector<HTMLInputElement>(selector);
      if (!found) throw new Error(`no field ${selector}`);
      return found;
    },
    async type(element: HTMLInputElement | HTMLTextAreaElement, text: string) {
      await act(async () => {
        // React keeps its own record of the value; the prototype's setter goes around it as a key press would.
        Object.getOwnPropertyDescriptor(Object.getPrototypeOf(element), "value")?.set?.call(element, text);
        element.dispatchEvent(new Event("input", { bubbles: true }));
      });
    },
    async press(words: string) {
      const found = button(words);
      if (!found) throw new Error(`no button ${words}`);
      await act(async () => found.click());
      await settle();
    },
    async submit() {
      await act(async () => {
        host.querySelector("form")?.dispatchEvent(new Event("submit", { bubbles: true, cancelable: true }));
      });
      await settle();
    },
  };
}
