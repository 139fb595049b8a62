// @vitest-environment happy-dom
import { act } from "react";
import { createRoot, type Root } from "react-dom/client";
import { afterEach, beforeEach, expect, it, vi } from "vitest";
import type { ActionResult } from "@/lib/doors/action-result";
import { newId } from "@/lib/ids";
import { NewVisitForm } from "./new-visit-form";

const router = { push: vi.fn(), refresh: vi.fn() };
vi.mock("next/navigation", () => ({ useRouter: () => router }));
vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

type Sent = { date: string; time: string; notes: string; confirm?: boolean };

let root: Root;
let host: HTMLElement;
beforeEach(() => {
  Reflect.set(globalThis, "IS_REACT_ACT_ENVIRONMENT", true);
  router.push.mockReset();
  host = document.createElement("div");
  document.body.append(host);
  root = createRoot(host);
});
afterEach(() => {
  act(() => root.unmount());
  host.remove();
});

const askOrBook = () =>
  vi.fn(async (input: unknown): Promise<ActionResult<{ id: string }>> => {
    const { confirm } = input as Sent;
    return confirm
      ? { ok: true, data: { id: "7" } }
      : { ok: false, error: { code: "needs-confirming", message: "This is 3 days ago." } };
  });

async function show(action: ReturnType<typeof askOrBook>) {
  await act(async () =>
    root.render(
      <NewVisitForm
        visitId={newId()}
        site={{ id: newId(), name: "Home", timeZone: "Europe/Dublin" }}
        instruments={[]}
        technicians={[{ id: newId(), name: "Ines" }]}
        chosen={{ date: "2026-05-11", instrumentIds: [] }}
        locale="en-GB"
        action={action}
      />,
    ),
  );
}

function field(name: string): HTMLInputElement | HTMLTextAreaElement {
  const found = host.querySelector<HTMLInputElement>(`[name="${name}"]`);
  if (!found) throw new Error(`no field ${name}`);
  return found;
}

async function type(name: string, text: string) {
  const element = field(name);
  await act(async () => {
    Object.getOwnPropertyDescriptor(Object.getPrototypeOf(element), "value")?.set?.call(element, text);
    element.dispatchEvent(new Event("input", { bubbles: true }));
  });
}

const settle = () => act(async () => void (await new Promise((done) => setTimeout(done, 20))));
async function submit() {
  await act(async () => {
    host.querySelector("form")?.dispatchEvent(new Event("submit", { bubbles: true, cancelable: true }));
  });
  await settle();
}
const button = (words: string) =>
  [...host.querySelectorAll("button")].find(({ textContent }) => textContent === words);
const sent = (action: ReturnType<typeof askOrBook>) => action.mock.calls.at(-1)?.[0] as Sent;

it("asks beside the day about a start in the past, and books what was typed when told to", async () => {
  const action = askOrBook();
  await show(action);
  await type("notes", "Forgotten in the book.");
  await submit();
  expect(host.querySelector("[role=alert]")?.textContent).toContain(
    "This is 3 days ago. Book it all the same?",
  );
  expect(document.activeElement).toBe(button("Book it all the same"));
  expect(field("notes").value).toBe("Forgotten in the book.");
  expect(router.push).not.toHaveBeenCalled();
  await act(async () => button("Book it all the same")?.click());
  await settle();
  expect(sent(action)).toMatchObject({
    date: "2026-05-11",
    notes: "Forgotten in the book.",
    confirm: true,
  });
  expect(router.push).toHaveBeenCalledWith("/visits/7");
});

it("takes the question back with another day, and asks anew about that one", async () => {
  const action = askOrBook();
  await show(action);
  await submit();
  await type("date", "2026-05-12");
  expect(button("Book it all the same")).toBeUndefined();
  await submit();
  expect(sent(action)).toMatchObject({ date: "2026-05-12" });
  expect(sent(action).confirm ?? false).toBe(false);
  expect(button("Book it all the same")).toBeDefined();
});
