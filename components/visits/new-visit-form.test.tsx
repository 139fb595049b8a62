// @vitest-environment happy-dom
import { beforeEach, expect, it, vi } from "vitest";
import type { ActionResult } from "@/lib/doors/action-result";
import { newId } from "@/lib/ids";
import { mounted } from "../../tests/support/mounted";
import { NewVisitForm } from "./new-visit-form";

const router = { push: vi.fn(), refresh: vi.fn() };
vi.mock("next/navigation", () => ({ useRouter: () => router }));
vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

type Sent = { date: string; time: string; notes: string; confirm?: boolean };

const page = mounted();
beforeEach(() => {
  router.push.mockReset();
});

const askOrBook = () =>
  vi.fn(async (input: unknown): Promise<ActionResult<{ id: string }>> => {
    const { confirm } = input as Sent;
    return confirm
      ? { ok: true, data: { id: "7" } }
      : { ok: false, error: { code: "needs-confirming", message: "This is 3 days ago." } };
  });

async function show(action: ReturnType<typeof askOrBook>) {
  await page.show(
    <NewVisitForm
      visitId={newId()}
      site={{ id: newId(), name: "Home", timeZone: "Europe/Dublin" }}
      instruments={[]}
      technicians={[{ id: newId(), name: "Ines" }]}
      chosen={{ date: "2026-05-11", time: "09:00", instrumentIds: [] }}
      locale="en-GB"
      action={action}
    />,
  );
}

const field = (name: string) => page.field(`[name="${name}"]`);
const sent = (action: ReturnType<typeof askOrBook>) => action.mock.calls.at(-1)?.[0] as Sent;

it("asks beside the day about a start in the past, and books what was typed when told to", async () => {
  const action = askOrBook();
  await show(action);
  await page.type(field("notes"), "Forgotten in the book.");
  await page.submit();
  expect(page.host().querySelector("[role=alert]")?.textContent).toContain(
    "This is 3 days ago. Book it all the same?",
  );
  expect(document.activeElement).toBe(page.button("Book it all the same"));
  expect(field("notes").value).toBe("Forgotten in the book.");
  expect(router.push).not.toHaveBeenCalled();
  await page.press("Book it all the same");
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
  await page.submit();
  await page.type(field("date"), "2026-05-12");
  expect(page.button("Book it all the same")).toBeUndefined();
  await page.submit();
  expect(sent(action)).toMatchObject({ date: "2026-05-12" });
  expect(sent(action).confirm ?? false).toBe(false);
  expect(page.button("Book it all the same")).toBeDefined();
});
