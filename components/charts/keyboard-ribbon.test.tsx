// @vitest-environment happy-dom
import { act, useState } from "react";
import { createRoot, type Root } from "react-dom/client";
import { renderToString } from "react-dom/server";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { KeyboardRibbon } from "./keyboard-ribbon";

Object.assign(globalThis, { IS_REACT_ACT_ENVIRONMENT: true });

let host: HTMLElement;
let root: Root;

beforeEach(() => {
  host = document.createElement("div");
  document.body.append(host);
  root = createRoot(host);
});

afterEach(() => {
  act(() => root.unmount());
  host.remove();
});

function Held({ onEnter }: { onEnter?: (midi: number) => void }) {
  const [cursor, setCursor] = useState(60);
  return (
    <KeyboardRibbon
      firstMidi={21}
      lastMidi={108}
      breakMidi={41}
      marks={[{ midi: 88, kind: "flagged" }]}
      cursor={cursor}
      onCursor={setCursor}
      onEnter={onEnter}
    />
  );
}

function slider(): HTMLElement {
  const element = host.querySelector<HTMLElement>('[role="slider"]');
  if (!element) throw new Error("the ribbon is no slider");
  return element;
}

function press(key: string, init: KeyboardEventInit = {}): boolean {
  const event = new KeyboardEvent("keydown", { key, bubbles: true, cancelable: true, ...init });
  act(() => {
    slider().dispatchEvent(event);
  });
  return event.defaultPrevented;
}

const now = () => Number(slider().getAttribute("aria-valuenow"));

describe("the ribbon by keyboard", () => {
  it("moves by a semitone, an octave and to the ends, and stays inside the compass", () => {
    act(() => root.render(<Held />));
    press("ArrowRight");
    expect(now()).toBe(61);
    expect(slider().getAttribute("aria-valuetext")).toBe("C sharp 4");
    press("ArrowDown");
    expect(now()).toBe(60);
    press("PageUp");
    expect(now()).toBe(72);
    press("Home");
    expect(now()).toBe(21);
    press("ArrowLeft");
    expect(now()).toBe(21);
    press("End");
    press("PageUp");
    expect(now()).toBe(108);
  });

  it("says in words what is wrong with the key in hand", () => {
    act(() => root.render(<Held />));
    for (let step = 0; step < 28; step++) press("ArrowRight");
    expect(slider().getAttribute("aria-valuetext")).toBe("E 6, does not belong");
  });

  it("leaves other keys and shortcuts to the page", () => {
    act(() => root.render(<Held />));
    expect(press("a")).toBe(false);
    expect(press("ArrowRight", { altKey: true })).toBe(false);
    expect(now()).toBe(60);
    expect(press("ArrowRight")).toBe(true);
  });

  it("opens the key in hand on Enter", () => {
    const onEnter = vi.fn();
    act(() => root.render(<Held onEnter={onEnter} />));
    press("ArrowRight");
    press("Enter");
    expect(onEnter).toHaveBeenCalledExactlyOnceWith(61);
  });

  it("can be reached by Tab and names its range", () => {
    act(() => root.render(<Held />));
    expect(slider().tabIndex).toBe(0);
    expect(slider().getAttribute("aria-valuemin")).toBe("21");
    expect(slider().getAttribute("aria-valuemax")).toBe("108");
  });
});

describe("the ribbon as a picture", () => {
  it("is no control without a cursor to move, and says its marks in words", () => {
    const html = renderToString(
      <KeyboardRibbon
        firstMidi={21}
        lastMidi={108}
        label="Notes read"
        marks={[
          { midi: 21, kind: "measured" },
          { midi: 82, kind: "next" },
        ]}
      />,
    );
    expect(html).not.toContain("slider");
    expect(html).toContain("Notes read; 1 note measured; next A sharp 5");
  });

  it("is drawn by the server: 88 keys and eight octave names", () => {
    const html = renderToString(<KeyboardRibbon firstMidi={21} lastMidi={108} />);
    expect(html.match(/<rect/g)).toHaveLength(88);
    expect(html.match(/<text/g)).toHaveLength(8);
  });
});
