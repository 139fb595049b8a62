// @vitest-environment happy-dom
import { QueryClientProvider } from "@tanstack/react-query";
import { act } from "react";
import { createRoot, type Root } from "react-dom/client";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { NetworkError } from "@/lib/client/fetch-json";
import { makeQueryClient } from "../providers";
import { setLetterKeys } from "../shell/letter-keys";
import { Ledger, type LedgerProps } from "./ledger";
import type { LedgerColumn } from "./ledger-types";

const router = { push: vi.fn() };
let search = "";

vi.mock("next/navigation", () => ({
  useRouter: () => router,
  usePathname: () => "/instruments",
  useSearchParams: () => new URLSearchParams(search),
}));
vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

type Piano = { id: string; href: string; name: string };
const columns: LedgerColumn<Piano>[] = [
  { id: "name", header: "Instrument", cell: (row) => row.name, sortable: true, phone: "title" },
  { id: "number", header: "Number", cell: (row) => `no. ${row.id}` },
];
const pianos = (from: number, count: number): Piano[] =>
  Array.from({ length: count }, (_, index) => {
    const id = String(from + index);
    return { id, href: `/instruments/${id}`, name: `Piano ${id}` };
  });

let root: Root;
let host: HTMLElement;

beforeEach(() => {
  Reflect.set(globalThis, "IS_REACT_ACT_ENVIRONMENT", true);
  search = "";
  router.push.mockReset();
  host = document.createElement("div");
  document.body.append(host);
  root = createRoot(host);
});
afterEach(() => {
  act(() => root.unmount());
  host.remove();
});

async function show(props: Partial<LedgerProps<Piano>>) {
  const client = makeQueryClient();
  client.setDefaultOptions({ queries: { ...client.getDefaultOptions().queries, retry: false } });
  const page = () => (
    <QueryClientProvider client={client}>
      <Ledger<Piano>
        label="Instruments"
        queryKey={["instruments"]}
        columns={columns}
        fetchPage={async () => ({ rows: pianos(1, 12), nextCursor: null, total: 12 })}
        empty={<p>Add the first piano.</p>}
        {...props}
      />
    </QueryClientProvider>
  );
  await act(async () => root.render(page()));
  await settle();
  return { again: () => act(async () => root.render(page())) };
}
const settle = () => act(async () => void (await new Promise((done) => setTimeout(done, 20))));

async function press(key: string) {
  const event = new KeyboardEvent("keydown", { key, bubbles: true, cancelable: true });
  await act(async () => void document.activeElement?.dispatchEvent(event));
  return event;
}
const inHand = () => document.activeElement?.closest("[data-row]")?.getAttribute("data-row");
const place = (id: string) => host.querySelector<HTMLElement>(`[data-row="${id}"] [data-row-focus]`);
const chosen = () => [...host.querySelectorAll("[data-chosen]")].map((row) => row.getAttribute("data-row"));
const button = (name: string) =>
  [...host.querySelectorAll("button")].find((element) => element.textContent?.startsWith(name));

describe("moving through a ledger by keyboard", () => {
  it("is one tab stop, and the arrows, J and K, Home and End move the row in hand", async () => {
    await show({});
    expect(host.querySelectorAll('tbody [tabindex="0"]')).toHaveLength(1);
    act(() => place("1")?.focus());
    const seen: Array<string | null | undefined> = [];
    for (const key of ["ArrowDown", "j", "k", "ArrowUp", "ArrowUp", "End", "ArrowDown", "Home", "PageDown"]) {
      await press(key);
      seen.push(inHand());
    }
    expect(seen).toEqual(["2", "3", "2", "1", "1", "12", "12", "1", "11"]);
    expect(host.querySelectorAll('tbody [tabindex="0"]')).toHaveLength(1);
  });

  it("opens by Enter, because the focus sits on the row's own link", async () => {
    await show({});
    act(() => place("2")?.focus());
    expect(document.activeElement?.tagName).toBe("A");
    expect(document.activeElement?.getAttribute("href")).toBe("/instruments/2");
    expect((await press("Enter")).defaultPrevented).toBe(false);
  });

  it("chooses by Space without scrolling the page, and hands the chosen rows to the bulk action", async () => {
    const run = vi.fn(async (_: Piano[]) => {});
    await show({ bulkActions: [{ label: "Archive", run }] });
    act(() => place("1")?.focus());
    expect((await press(" ")).defaultPrevented).toBe(true);
    await press("ArrowDown");
    await press("x");
    await press("ArrowDown");
    await press(" ");
    await press(" ");
    expect(chosen()).toEqual(["1", "2"]);
    await act(async () => button("Archive")?.click());
    expect(run).toHaveBeenCalledWith(pianos(1, 2));
    expect(chosen()).toEqual([]);
  });

  it("keeps the rows chosen when the bulk action fails", async () => {
    await show({ bulkActions: [{ label: "Archive", run: async () => Promise.reject(new Error("No.")) }] });
    act(() => place("1")?.focus());
    await press(" ");
    await act(async () => button("Archive")?.click());
    expect(chosen()).toEqual(["1"]);
  });

  it("leaves Space alone where nothing can be chosen", async () => {
    await show({});
    act(() => place("1")?.focus());
    expect((await press(" ")).defaultPrevented).toBe(false);
  });
});

describe("a ledger's keys from the page around it", () => {
  const onPage = async (key: string, target: Element = document.body, more: KeyboardEventInit = {}) => {
    const event = new KeyboardEvent("keydown", { key, bubbles: true, cancelable: true, ...more });
    await act(async () => void target.dispatchEvent(event));
    return event;
  };
  const inHand = () => document.activeElement?.closest("[data-row]")?.getAttribute("data-row") ?? null;
  /** Something beside the list that has the focus. */
  async function beside(html: string) {
    const box = document.createElement("div");
    box.innerHTML = html;
    host.append(box);
    const element = box.querySelector<HTMLElement>("[data-here]");
    if (!element) throw new Error("nothing to focus");
    act(() => element.focus());
    return element;
  }

  afterEach(() => act(() => setLetterKeys(true)));

  it.each(["j", "k", "ArrowDown", "ArrowUp"])(
    "%s goes to the row in hand without a click first",
    async (key) => {
      await show({});
      expect((await onPage(key)).defaultPrevented).toBe(true);
      expect(inHand()).toBe("1");
      await press("j");
      expect(inHand()).toBe("2");
    },
  );

  it("goes there from the link that led to the page, by letter; arrows go on scrolling", async () => {
    await show({});
    const link = await beside('<a href="/customers" data-here>Customers</a>');
    expect((await onPage("ArrowDown", link)).defaultPrevented).toBe(false);
    await onPage("j", link);
    expect(inHand()).toBe("1");
  });

  it.each([
    "<input data-here>",
    "<textarea data-here></textarea>",
    "<select data-here></select>",
    "<button data-here>Sort</button>",
    '<div contenteditable tabindex="0" data-here></div>',
    '<div popover><a href="/x" data-here>X</a></div>',
    '<dialog open><a href="/x" data-here>X</a></dialog>',
  ])("leaves the keys to %s", async (html) => {
    await show({});
    const element = await beside(html);
    for (const key of ["j", "k", "ArrowDown", "ArrowUp"]) {
      expect((await onPage(key, element)).defaultPrevented, key).toBe(false);
    }
    expect(inHand()).toBeNull();
  });

  it("leaves keys with Ctrl, Alt or the command key, and everything while a dialog is open", async () => {
    await show({});
    for (const more of [{ ctrlKey: true }, { altKey: true }, { metaKey: true }]) {
      expect((await onPage("j", document.body, more)).defaultPrevented).toBe(false);
    }
    await beside('<dialog open><a href="/x" data-here>X</a></dialog>');
    expect((await onPage("j")).defaultPrevented).toBe(false);
  });

  it("acts on no letter once these are turned off, in the list or out of it, and the foot says so", async () => {
    await show({ bulkActions: [{ label: "Archive", run: async () => {} }] });
    expect(host.textContent).toContain("J K move");
    act(() => setLetterKeys(false));
    expect((await onPage("j")).defaultPrevented).toBe(false);
    expect(host.textContent).not.toContain("J K");
    expect(host.textContent).toContain("Space choose");
    await onPage("ArrowDown");
    await press("j");
    await press("x");
    expect(inHand()).toBe("1");
    expect(host.querySelector("[data-chosen]")).toBeNull();
    await press("ArrowDown");
    expect(inHand()).toBe("2");
  });

  it("does nothing where the list is empty", async () => {
    await show({ fetchPage: async () => ({ rows: [], nextCursor: null }) });
    expect((await onPage("j")).defaultPrevented).toBe(false);
  });
});

describe("a ledger's states", () => {
  it("asks the server for what the address says", async () => {
    search = "q=steg&sort=-name";
    const fetchPage = vi.fn(async () => ({ rows: pianos(1, 1), nextCursor: null }));
    await show({ fetchPage });
    expect(fetchPage).toHaveBeenCalledWith(
      { search: "steg", sort: { id: "name", descending: true }, filters: {}, cursor: null },
      expect.any(AbortSignal),
    );
  });

  it("does not ask again for the page the server rendered", async () => {
    const fetchPage = vi.fn(async () => ({ rows: pianos(1, 1), nextCursor: null }));
    await show({ fetchPage, initialPage: { rows: pianos(1, 3), nextCursor: null } });
    expect(fetchPage).not.toHaveBeenCalled();
    expect(host.querySelectorAll("[data-row]")).toHaveLength(3);
  });

  it("shows more by the cursor and keeps what is there", async () => {
    const fetchPage = vi.fn(async ({ cursor }: { cursor: string | null }) =>
      cursor
        ? { rows: pianos(3, 2), nextCursor: null, total: 4 }
        : { rows: pianos(1, 2), nextCursor: "c", total: 4 },
    );
    await show({ fetchPage });
    expect(host.textContent).toContain("1–2 of 4");
    await act(async () => button("Show more")?.click());
    await settle();
    expect([...host.querySelectorAll("[data-row]")].map((row) => row.getAttribute("data-row"))).toEqual([
      "1",
      "2",
      "3",
      "4",
    ]);
    expect(host.textContent).toContain("4 in all");
  });

  it("says what to do first when empty, and something else when only the filters are too narrow", async () => {
    const none = async () => ({ rows: [], nextCursor: null });
    const { again } = await show({ fetchPage: none });
    expect(host.textContent).toContain("Add the first piano.");
    search = "q=zzz";
    await again();
    await settle();
    expect(host.textContent).toContain("Nothing fits these filters");
  });

  it("keeps the reason of a failure and tries again when asked", async () => {
    let down = true;
    await show({
      fetchPage: async () => {
        if (down) throw new NetworkError(null);
        return { rows: pianos(1, 2), nextCursor: null };
      },
    });
    expect(host.querySelector("[role=alert]")?.textContent).toContain("did not answer");
    down = false;
    await act(async () => button("Try again")?.click());
    await settle();
    expect(host.querySelectorAll("[data-row]")).toHaveLength(2);
  });
});
