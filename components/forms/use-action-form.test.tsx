// @vitest-environment happy-dom
import { act } from "react";
import { describe, expect, it, vi } from "vitest";
import { z } from "zod";
import type { ActionResult } from "@/lib/doors/action-result";
import { mounted } from "@/tests/support/mounted";
import { ActionForm, SubmitButton } from "./action-form";
import { NumberInput, TextInput } from "./text-input";
import { readNumber, useActionForm } from "./use-action-form";

const schema = z.object({
  name: z.string().min(1, "Write a name."),
  humidity: z.number("Not a number. Write 58.").min(0).max(100, "At most 100 %.").optional(),
});

type Answer = ActionResult<{ id: string }>;

const page = mounted();

function TestForm({
  action,
  onSuccess,
}: {
  action: (input: unknown) => Promise<Answer>;
  onSuccess?: (data: { id: string }) => void;
}) {
  const state = useActionForm({ schema, action, onSuccess, defaultValues: { name: "" } });
  return (
    <ActionForm state={state} label="Instrument">
      <TextInput label="Name" {...state.field("name")} />
      <NumberInput label="Humidity" unit="%" {...state.numberField("humidity")} />
      <SubmitButton state={state}>Save</SubmitButton>
    </ActionForm>
  );
}

const input = (name: string) => page.field(`input[name="${name}"]`);
const type = (name: string, text: string) => page.type(input(name), text);

describe("a form tied to a server action", () => {
  it("does not call the action while a field is wrong, and names the field", async () => {
    const action = vi.fn<(given: unknown) => Promise<Answer>>();
    await page.show(<TestForm action={action} />);
    await page.submit();
    expect(action).not.toHaveBeenCalled();
    expect(input("name").getAttribute("aria-invalid")).toBe("true");
    const described = input("name").getAttribute("aria-describedby") ?? "";
    expect(document.getElementById(described)?.textContent).toBe("Write a name.");
    expect(document.activeElement).toBe(input("name"));
  });

  it("sends a decimal comma as a number and leaves an empty optional field out", async () => {
    const action = vi.fn(async (_: unknown): Promise<Answer> => ({ ok: true, data: { id: "1" } }));
    const onSuccess = vi.fn();
    await page.show(<TestForm action={action} onSuccess={onSuccess} />);
    await type("name", "Castellan 186");
    await type("humidity", "57,5");
    await page.submit();
    expect(action).toHaveBeenLastCalledWith({ name: "Castellan 186", humidity: 57.5 });
    await type("humidity", "");
    await page.submit();
    expect(action).toHaveBeenLastCalledWith({ name: "Castellan 186", humidity: undefined });
    expect(onSuccess).toHaveBeenCalledTimes(2);
  });

  it("puts the server's field errors at their fields and keeps what was typed", async () => {
    const action = async (): Promise<Answer> => ({
      ok: false,
      error: {
        code: "invalid",
        message: "This name is taken.",
        fields: { name: "Another instrument has it." },
      },
    });
    await page.show(<TestForm action={action} />);
    await type("name", "Castellan 186");
    await type("humidity", "58");
    await page.submit();
    expect(input("name").value).toBe("Castellan 186");
    expect(input("humidity").value).toBe("58");
    expect(input("name").getAttribute("aria-invalid")).toBe("true");
    const alert = page.host().querySelector("[role=alert]");
    expect(alert?.textContent).toContain("This name is taken.");
    expect(alert?.textContent).toContain("Another instrument has it.");
    expect(document.activeElement).toBe(input("name"));
  });

  it("gives the focus to the reason itself where it belongs to no field", async () => {
    const action = async (): Promise<Answer> => ({
      ok: false,
      error: { code: "stale", message: "Somebody changed this meanwhile." },
    });
    await page.show(<TestForm action={action} />);
    await type("name", "Castellan 186");
    await page.submit();
    expect(document.activeElement?.getAttribute("role")).toBe("alert");
  });

  it("goes to the first field that is wrong, in the order of the page, and from the summary to each", async () => {
    const action = vi.fn<(given: unknown) => Promise<Answer>>();
    await page.show(<TestForm action={action} />);
    await type("name", "Castellan 186");
    await type("humidity", "140");
    await page.submit();
    expect(document.activeElement).toBe(input("humidity"));
    act(() => input("name").focus());
    const link = [...page.host().querySelectorAll("button")].find(
      ({ textContent }) => textContent === "At most 100 %.",
    );
    act(() => link?.click());
    expect(document.activeElement).toBe(input("humidity"));
  });

  it("offers to send again when the server does not answer, with nothing lost", async () => {
    let answers = 0;
    const action = async (): Promise<Answer> => {
      answers += 1;
      if (answers === 1) throw new TypeError("Failed to fetch");
      return { ok: true, data: { id: "1" } };
    };
    const onSuccess = vi.fn();
    await page.show(<TestForm action={action} onSuccess={onSuccess} />);
    await type("name", "Castellan 186");
    await page.submit();
    const alert = page.host().querySelector("[role=alert]");
    expect(alert?.textContent).toContain("did not answer");
    expect(alert?.querySelector("button[type=submit]")?.textContent).toBe("Send again");
    expect(input("name").value).toBe("Castellan 186");
    await page.submit();
    expect(onSuccess).toHaveBeenCalledOnce();
    expect(page.host().querySelector("[role=alert]")).toBeNull();
  });

  it("writes once when the button is pressed twice", async () => {
    let finish: (answer: Answer) => void = () => {};
    const action = vi.fn(() => new Promise<Answer>((done) => (finish = done)));
    await page.show(<TestForm action={action} />);
    await type("name", "Castellan 186");
    await page.submit();
    await page.submit();
    expect(action).toHaveBeenCalledOnce();
    expect(page.host().querySelector("button[type=submit]")?.getAttribute("aria-busy")).toBe("true");
    await act(async () => finish({ ok: true, data: { id: "1" } }));
    expect(page.host().querySelector("button[type=submit]")?.getAttribute("aria-busy")).toBeNull();
  });

  it("lets the framework's redirect pass instead of calling it a network failure", async () => {
    const redirect = Object.assign(new Error("NEXT_REDIRECT"), { digest: "NEXT_REDIRECT;push;/today;307;" });
    const action = async (): Promise<Answer> => {
      throw redirect;
    };
    const failures: unknown[] = [];
    const keep = (reason: unknown) => failures.push(reason);
    process.on("unhandledRejection", keep);
    try {
      await page.show(<TestForm action={action} />);
      await type("name", "Castellan 186");
      await page.submit();
      expect(page.host().querySelector("[role=alert]")).toBeNull();
      expect(failures).toEqual([redirect]);
    } finally {
      process.off("unhandledRejection", keep);
    }
  });
});

describe("reading a typed number", () => {
  it.each([
    ["784.2", 784.2],
    ["784,2", 784.2],
    [" 58 ", 58],
    ["−3.5", -3.5],
    ["+11.6", 11.6],
    ["", undefined],
  ])("reads %j", (typed, value) => {
    expect(readNumber(typed)).toBe(value);
  });

  it.each(["7 84.2", "1,234.5", "12e3", "Infinity", "0x10", "58%"])(
    "leaves %j to the schema, so that it is shown as typed",
    (typed) => {
      expect(readNumber(typed)).toBe(typed);
    },
  );
});
