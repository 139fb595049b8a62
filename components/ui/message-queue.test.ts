import { afterEach, describe, expect, it, vi } from "vitest";
import { dismissMessage, showMessage, shownMessages, toastWithUndo } from "./message-queue";

afterEach(() => {
  for (const message of shownMessages()) dismissMessage(message.id);
});

function pressAction(id: number) {
  const action = shownMessages().find((message) => message.id === id)?.action;
  if (!action || !("onPress" in action)) throw new Error("the message has no action");
  action.onPress();
}

describe("messages", () => {
  it("keeps the newest three in sight, in the order they came", () => {
    for (const text of ["one", "two", "three", "four"]) showMessage({ text });
    expect(shownMessages().map((message) => message.text)).toEqual(["two", "three", "four"]);
  });

  it("undoes once, however often the button is pressed", async () => {
    const undo = vi.fn();
    const id = toastWithUndo("Castellan 186 was archived.", undo);
    pressAction(id);
    pressAction(id);
    await Promise.resolve();
    expect(undo).toHaveBeenCalledOnce();
  });

  it.each([
    [
      "throws",
      () => {
        throw new Error("stale");
      },
    ],
    ["is refused", () => Promise.reject(new Error("stale"))],
  ])("says so when the undo %s", async (_, undo) => {
    pressAction(toastWithUndo("Archived.", undo));
    await vi.waitFor(() =>
      expect(shownMessages().at(-1)).toMatchObject({ kind: "attention", text: "That could not be undone." }),
    );
  });
});
