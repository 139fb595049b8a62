// @vitest-environment happy-dom
import { expect, it, vi } from "vitest";
import { movesOf, type VisitState } from "@/lib/visits/rules";
import { mounted } from "../../tests/support/mounted";
import { NextStep, type StepAction, VisitMoves } from "./visit-moves";

vi.mock("next/navigation", () => ({ useRouter: () => ({ push: vi.fn(), refresh: vi.fn() }) }));
vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

const { show, host } = mounted();

const never: StepAction = async () => ({ ok: false, error: { code: "stale", message: "Stale." } });
const goOn = { label: "Continue: read as found", href: "/instruments/piano/sheets/new" };

function visit(state: VisitState) {
  return {
    id: "7",
    version: 1,
    start: "2026-05-14T09:00:00+02:00",
    end: "2026-05-14T10:30:00+02:00",
    moves: movesOf("technician", state, null),
  };
}

/** The one primary action: under the thumb, and at the head of the page on the desk. */
function primaries() {
  const strip = host().querySelector("[data-action-strip]");
  const words = (within: Iterable<Element>) =>
    [...within].filter(({ className }) => className.includes("bg-felt-fill")).map((one) => one.textContent);
  const all = [...host().querySelectorAll("a, button")];
  return {
    strip: words(all.filter((one) => strip?.contains(one))),
    head: words(all.filter((one) => !strip?.contains(one))),
  };
}

const page = (state: VisitState, on: typeof goOn | null) => (
  <VisitMoves
    visit={visit(state)}
    locale="en-GB"
    step={never}
    move={never}
    changeHref={undefined}
    goOn={on}
  />
);

it.each([
  ["offered", null, "Confirm"],
  ["confirmed", null, "Set off"],
  ["on-the-way", null, "Begin work"],
  ["in-progress", goOn, "Continue: read as found"],
  ["in-progress", null, "Finish work"],
  ["done", null, "Close visit"],
] as const)(
  "a visit that is %s says the same next step at its head and under the thumb",
  async (state, on, words) => {
    await show(page(state, on));
    expect(primaries()).toEqual({ strip: [words], head: [words] });
  },
);

it("keeps the end of the work beside work that goes on", async () => {
  await show(page("in-progress", goOn));
  const strip = host().querySelector("[data-action-strip]");
  expect([...(strip?.querySelectorAll("a, button") ?? [])].map(({ textContent }) => textContent)).toEqual([
    "Finish work",
    "Continue: read as found",
  ]);
});

it("draws no strip for a visit that is over", async () => {
  await show(page("closed", null));
  expect(host().querySelector("[data-action-strip]")).toBeNull();
});

it("leads from the day's page with the words of the visit's own page", async () => {
  const next = { visit: visit("in-progress"), step: never, siteName: "Ropewalk 2", goOn };
  await show(
    <>
      <NextStep {...next} strip />
      <NextStep {...next} strip={false} />
    </>,
  );
  expect(primaries()).toEqual({ strip: ["Continue: read as found"], head: ["Continue: read as found"] });
  await show(<NextStep {...next} visit={visit("confirmed")} goOn={null} strip />);
  expect(primaries().strip).toEqual(["Set off: Ropewalk 2"]);
});
