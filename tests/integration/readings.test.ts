import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { PUT as putNote } from "@/app/api/v1/sheets/[id]/notes/[midi]/route";
import { closeDatabases } from "@/db/client";
import { equalTemperedHz, fit, partialHzFromF1 } from "@/lib/acoustics";
import { parseInput } from "@/lib/doors/fields";
import { env } from "@/lib/env";
import { newId } from "@/lib/ids";
import { newSheet, noteInput, noteQuery, notesInput, sheetChange } from "@/lib/readings/schema";
import {
  changeSheet,
  createSheet,
  findSheets,
  getNotes,
  getSheet,
  removeNote,
  saveNote,
  saveNotes,
} from "@/lib/readings/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
  owner,
} from "../support/factories";
import { newShop } from "../support/people";

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

const A3 = 57;
const B = 2.5e-4;

/** Partials of a stiff string at its equal-tempered pitch. */
const string = (midi: number, partials: readonly number[], b = B) =>
  partials.map((partial) => ({ partial, hz: partialHzFromF1(partial, equalTemperedHz(midi), b) }));

const note = (fields: Record<string, unknown>) => parseInput(noteInput, fields);
const clean = string(A3, [1, 2, 3, 4, 5, 6]);

async function furnished() {
  const shop = await makeShop();
  const customerId = await makeCustomer(shop.shopId);
  const siteId = await makeSite(shop.shopId, customerId);
  const instrumentId = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
  const visit = await makeVisit(shop.shopId, {
    siteId,
    instrumentId,
    memberId: shop.technician.memberId,
  });
  const sheet = await createSheet(
    shop.technician,
    instrumentId,
    parseInput(newSheet, {
      stage: "as-found",
      takenAt: "2026-03-02T09:10:00+00:00",
      referenceHz: 440,
      humidityPercent: 58,
      jobId: visit.jobId,
    }),
  );
  return { shop, instrumentId, ...visit, sheet };
}

type Furnished = Awaited<ReturnType<typeof furnished>>;
let here: Furnished;
let elsewhere: Furnished;

beforeAll(async () => {
  here = await furnished();
  elsewhere = await furnished();
});

const save = (fields: Record<string, unknown>, midi = A3, place: Furnished = here) =>
  saveNote(place.shop.technician, place.sheet.id, midi, note(fields));

describe("saving a note", () => {
  it("answers with the fit of what was sent and bears it on the sheet", async () => {
    const place = await furnished();
    const saved = await save({ readings: clean, version: 0 }, A3, place);
    const own = fit({ midi: A3, referenceHz: 440, kept: [], dropped: [], readings: clean });
    expect(saved).toMatchObject({ midi: A3, string: "all", take: 1, version: 1, b: own.b, f1Hz: own.f1Hz });
    expect(saved.b).toBeCloseTo(B, 8);
    const read = await getSheet(place.shop.technician, place.sheet.id);
    expect(read).toMatchObject({
      notesRead: 1,
      canChange: true,
      humidityPercent: 58,
      visitId: place.visitId,
    });
    expect(read.notes).toEqual([saved]);
    expect(saved.readings.map(({ sigmaCents }) => sigmaCents)).toEqual(clean.map(() => null));
    expect(
      (await findSheets(place.shop.office, place.instrumentId, { most: 10, archived: "hide" })).items,
    ).toMatchObject([{ id: place.sheet.id, notesRead: 1, stage: "as-found" }]);
  });

  it("stores hertz for cents, at the sheet's reference", async () => {
    const place = await furnished();
    const saved = await save({ readings: [{ partial: 2, cents: 120 }] }, 69, place);
    expect(saved.readings[0]?.hz).toBeCloseTo(880 * 2 ** 0.1, 9);
    expect(saved).toMatchObject({ b: null, warnings: ["single-reading"] });
  });

  it("keeps an error that was given with its reading, and none where none was", async () => {
    const place = await furnished();
    const readings = clean.map((reading, index) => (index === 2 ? { ...reading, sigmaCents: 0.4 } : reading));
    await save({ readings }, A3, place);
    const { notes } = await getSheet(place.shop.technician, place.sheet.id);
    expect(notes[0]?.readings.map(({ sigmaCents }) => sigmaCents)).toEqual([
      null,
      null,
      0.4,
      null,
      null,
      null,
    ]);
  });

  it("keeps strings and takes of one key apart", async () => {
    const place = await furnished();
    await save({ readings: clean }, A3, place);
    await save({ readings: clean, string: 1 }, A3, place);
    await save({ readings: clean, string: 1, take: 2 }, A3, place);
    const { items } = await getNotes(place.shop.technician, place.sheet.id, A3);
    expect(items.map(({ string: which, take }) => [which, take])).toEqual([
      ["all", 1],
      [1, 1],
      [1, 2],
    ]);
  });

  it("records what a person keeps and drops, and the fit follows", async () => {
    const place = await furnished();
    const readings = clean.map((reading) =>
      reading.partial === 5 ? { partial: 5, hz: reading.hz * 2 ** (14 / 1200) } : reading,
    );
    const first = await save({ readings, version: 0 }, A3, place);
    expect(first.rejected.map(({ partial }) => partial)).toEqual([5]);
    const kept = await save({ readings, kept: [5], version: 1 }, A3, place);
    expect(kept).toMatchObject({ kept: [5], rejected: [], version: 2 });
    const dropped = await save({ readings, dropped: [1, 9], version: 2 }, A3, place);
    expect(dropped.dropped).toEqual([1]);
    expect(dropped.rejected).toContainEqual(
      expect.objectContaining({ partial: 1, reason: "dropped-by-hand" }),
    );
    const [stored] = await owner()`select kept, dropped, version from note_reading
      where shop_id = ${place.shop.shopId} and sheet_id = ${place.sheet.id}`;
    expect(stored).toEqual({ kept: [], dropped: [1], version: 3 });
  });

  it("takes a note off, and not on an old version", async () => {
    const place = await furnished();
    await save({ readings: clean }, A3, place);
    const at = (query: Record<string, unknown>) => parseInput(noteQuery, query);
    await expect(
      removeNote(place.shop.technician, place.sheet.id, A3, at({ version: 7 })),
    ).rejects.toMatchObject({ code: "stale", more: { current: { version: 1 } } });
    await removeNote(place.shop.technician, place.sheet.id, A3, at({ version: 1 }));
    expect((await getSheet(place.shop.technician, place.sheet.id)).notes).toEqual([]);
    await expect(removeNote(place.shop.technician, place.sheet.id, A3, at({}))).rejects.toMatchObject({
      code: "not-found",
    });
  });
});

describe("bad input is named where it is, and changes nothing", () => {
  it.each([
    ["a word", { partial: 1, hz: "abc" }, "readings.0.hz"],
    ["zero", { partial: 1, hz: 0 }, "readings.0.hz"],
    ["a negative", { partial: 1, hz: -220 }, "readings.0.hz"],
    ["infinity", { partial: 1, hz: Number.POSITIVE_INFINITY }, "readings.0.hz"],
    ["no number at all", { partial: 1, hz: Number.NaN }, "readings.0.hz"],
    ["beyond hearing", { partial: 1, hz: 200_000 }, "readings.0.hz"],
    ["cents beyond two octaves", { partial: 1, cents: 2500 }, "readings.0.cents"],
    ["a partial that is none", { partial: 0, hz: 220 }, "readings.0.partial"],
    ["half a partial", { partial: 1.5, hz: 220 }, "readings.0.partial"],
  ])("%s", (_, reading, path) => {
    expect(() => note({ readings: [reading] })).toThrow(
      expect.objectContaining({
        code: "invalid",
        more: { fields: expect.objectContaining({ [path]: expect.any(String) }) },
      }),
    );
  });

  it("a partial twice", async () => {
    await expect(save({ readings: [...clean, { partial: 3, hz: 660 }] })).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { "readings.6.partial": "Partial 3 stands twice." } },
    });
  });

  it("a key the instrument has not", async () => {
    for (const midi of [20, 109]) {
      await expect(save({ readings: clean }, midi)).rejects.toMatchObject({
        code: "invalid",
        more: { fields: { midi: "This instrument's keys run from A0 to C8." } },
      });
    }
  });

  it("no readings, and more than there can be", () => {
    expect(() => note({ readings: [] })).toThrow();
    expect(() => note({ readings: Array.from({ length: 65 }, () => ({ partial: 1, hz: 220 })) })).toThrow();
  });
});

describe("a frequency far from where it is expected", () => {
  const far = clean.map((reading) =>
    reading.partial === 4 ? { partial: 4, hz: string(A3, [6])[0]?.hz } : reading,
  );

  it("is asked about at its field and saved as typed once confirmed", async () => {
    const place = await furnished();
    await expect(save({ readings: far }, A3, place)).rejects.toMatchObject({
      code: "invalid",
      more: {
        fields: { "readings.3.hz": expect.stringMatching(/^Partial 4 is 7\d\d cents above.*partial 6\./) },
      },
    });
    expect((await getSheet(place.shop.technician, place.sheet.id)).notes).toEqual([]);
    const saved = await save({ readings: far, confirmed: [4] }, A3, place);
    expect(saved.readings[3]?.hz).toBe(far[3]?.hz);
    expect(saved.rejected).toContainEqual(
      expect.objectContaining({ partial: 4, reason: "wrong-partial-number", fitsPartial: 6 }),
    );
  });

  it("is asked about at the cents it was typed in", async () => {
    await expect(save({ readings: [{ partial: 1, cents: 412 }] }, 50)).rejects.toMatchObject({
      more: { fields: { "readings.0.cents": expect.stringContaining("412 cents above") } },
    });
  });

  it("is measured from the instrument's own pitch: sixty cents flat is no question", async () => {
    const place = await furnished();
    const flat = (midi: number, cents: number) =>
      string(midi, [1, 2, 3, 4, 5]).map(({ partial, hz }) => ({ partial, hz: hz * 2 ** (cents / 1200) }));
    for (const midi of [52, 57, 62, 67]) {
      await save({ readings: flat(midi, -160), confirmed: [1, 2, 3, 4, 5] }, midi, place);
    }
    await save({ readings: flat(60, -260).slice(0, 1) }, 60, place);
    await expect(save({ readings: flat(64, 60).slice(0, 1) }, 64, place)).rejects.toMatchObject({
      code: "invalid",
    });
  });
});

describe("two people at one note", () => {
  it("gives the second saver the first one's note instead of writing over it", async () => {
    const place = await furnished();
    await save({ readings: clean, version: 0 }, A3, place);
    const mine = note({ readings: clean.slice(0, 4), version: 0 });
    await expect(saveNote(place.shop.owner, place.sheet.id, A3, mine)).rejects.toMatchObject({
      code: "stale",
      more: { current: { version: 1, readings: { length: 6 } } },
    });
    const again = await saveNote(place.shop.owner, place.sheet.id, A3, { ...mine, version: 1 });
    expect(again.version).toBe(2);
    await expect(save({ readings: clean, version: 1 }, A3, place)).rejects.toMatchObject({ code: "stale" });
  });

  it("lets exactly one of two simultaneous first saves through", async () => {
    const place = await furnished();
    const outcomes = await Promise.allSettled([
      save({ readings: clean, version: 0 }, A3, place),
      saveNote(place.shop.owner, place.sheet.id, A3, note({ readings: clean.slice(0, 5), version: 0 })),
    ]);
    expect(outcomes.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
    expect(outcomes.find(({ status }) => status === "rejected")).toMatchObject({
      reason: { code: "stale" },
    });
    expect((await getSheet(place.shop.technician, place.sheet.id)).notes).toHaveLength(1);
  });

  it("takes the same save sent twice for one, as after an answer lost on the way", async () => {
    const place = await furnished();
    const first = await save({ readings: clean, version: 0 }, A3, place);
    expect(await save({ readings: clean, version: 0 }, A3, place)).toEqual(first);
  });

  it("says that a changed note was removed meanwhile", async () => {
    const place = await furnished();
    await save({ readings: clean, version: 0 }, A3, place);
    await removeNote(place.shop.technician, place.sheet.id, A3, parseInput(noteQuery, { version: 1 }));
    await expect(save({ readings: clean.slice(1), version: 1 }, A3, place)).rejects.toMatchObject({
      code: "stale",
      more: { current: null },
    });
  });
});

describe("whole rows", () => {
  const rows = (notes: unknown[]) => parseInput(notesInput, { notes });

  it("are saved all together", async () => {
    const place = await furnished();
    const notes = [45, 52, 57, 64].map((midi) => ({
      midi,
      readings: string(midi, [1, 2, 3, 4]),
      version: 0,
    }));
    const { items } = await saveNotes(place.shop.technician, place.sheet.id, rows(notes));
    expect(items.map(({ midi }) => midi)).toEqual([45, 52, 57, 64]);
    expect((await getSheet(place.shop.technician, place.sheet.id)).notesRead).toBe(4);
  });

  it("are not saved at all when one is wrong, and every fault is named at its row", async () => {
    const place = await furnished();
    const notes = [
      { midi: 45, readings: string(45, [1, 2, 3]) },
      { midi: 109, readings: string(100, [1]) },
      { midi: 57, readings: [{ partial: 1, hz: 440 }] },
      { midi: 60, readings: [...string(60, [1, 2]), { partial: 2, hz: 523 }] },
    ];
    await expect(saveNotes(place.shop.technician, place.sheet.id, rows(notes))).rejects.toMatchObject({
      code: "invalid",
      more: {
        fields: {
          "notes.1.midi": expect.stringContaining("A0 to C8"),
          "notes.2.readings.0.hz": expect.stringContaining("above where it is expected"),
          "notes.3.readings.2.partial": "Partial 2 stands twice.",
        },
      },
    });
    expect((await getSheet(place.shop.technician, place.sheet.id)).notes).toEqual([]);
  });

  it("refuse one note twice, and more rows than a sheet has keys", async () => {
    const twice = [1, 2].map(() => ({ midi: A3, readings: clean }));
    await expect(saveNotes(here.shop.technician, here.sheet.id, rows(twice))).rejects.toMatchObject({
      more: { fields: { notes: "The same note and string stands twice." } },
    });
    expect(() => rows(Array.from({ length: 10_000 }, () => ({ midi: A3, readings: clean })))).toThrow(
      expect.objectContaining({
        more: { fields: { notes: expect.stringContaining("At most 128 notes") } },
      }),
    );
  });
});

describe("who may write a sheet", () => {
  it("the office reads, and is told so", async () => {
    expect((await getSheet(here.shop.office, here.sheet.id)).canChange).toBe(false);
    await expect(
      saveNote(here.shop.office, here.sheet.id, A3, note({ readings: clean })),
    ).rejects.toMatchObject({ code: "forbidden" });
  });

  it("a technician who is not on the visit reads, and is told so", async () => {
    const { shop, sheet, instrumentId } = here;
    expect((await getSheet(shop.otherTechnician, sheet.id)).canChange).toBe(false);
    await expect(
      saveNote(shop.otherTechnician, sheet.id, A3, note({ readings: clean })),
    ).rejects.toMatchObject({ code: "forbidden", message: expect.stringContaining("visit you are not on") });
    await expect(
      createSheet(
        shop.otherTechnician,
        instrumentId,
        parseInput(newSheet, { stage: "as-left", takenAt: "2026-03-02T10:10:00Z", referenceHz: 440 }),
      ),
    ).rejects.toMatchObject({ code: "forbidden" });
  });

  it("another shop's sheet, note or job does not exist", async () => {
    const { shop, sheet } = elsewhere;
    const missing = { code: "not-found" };
    await expect(getSheet(here.shop.owner, sheet.id)).rejects.toMatchObject(missing);
    await expect(getNotes(here.shop.owner, sheet.id, A3)).rejects.toMatchObject(missing);
    await expect(saveNote(here.shop.owner, sheet.id, A3, note({ readings: clean }))).rejects.toMatchObject(
      missing,
    );
    await expect(
      findSheets(here.shop.owner, elsewhere.instrumentId, { most: 10, archived: "hide" }),
    ).rejects.toMatchObject(missing);
    await expect(
      createSheet(
        here.shop.owner,
        here.instrumentId,
        parseInput(newSheet, {
          stage: "as-left",
          takenAt: "2026-03-02T10:10:00Z",
          referenceHz: 440,
          jobId: elsewhere.jobId,
        }),
      ),
    ).rejects.toMatchObject({ code: "invalid", more: { fields: { jobId: expect.any(String) } } });
    expect((await getSheet(shop.owner, sheet.id)).notes).toEqual([]);
  });
});

describe("the sheet itself", () => {
  it("is archived and restored, each on the version that was seen", async () => {
    const place = await furnished();
    const change = (fields: Record<string, unknown>) =>
      changeSheet(place.shop.technician, place.sheet.id, parseInput(sheetChange, fields));
    const archived = await change({ version: 1, archived: true });
    expect(archived.archivedAt).not.toBeNull();
    const list = (which: "hide" | "only") =>
      findSheets(place.shop.technician, place.instrumentId, { most: 10, archived: which });
    expect((await list("hide")).items).toEqual([]);
    expect((await list("only")).items).toHaveLength(1);
    await expect(change({ version: 1, archived: false })).rejects.toMatchObject({ code: "stale" });
    expect((await change({ version: 2, archived: false })).archivedAt).toBeNull();
  });

  it("is one sheet when begun twice with one id", async () => {
    const id = newId();
    const begin = () =>
      createSheet(
        here.shop.technician,
        here.instrumentId,
        parseInput(newSheet, { id, stage: "as-left", takenAt: "2026-03-02T10:10:00Z", referenceHz: 442 }),
      );
    expect(await begin()).toEqual(await begin());
  });
});

describe("the door", () => {
  const put = (body: string, headers: Headers = new Headers()) => {
    headers.set("content-type", "application/json");
    headers.set("origin", new URL(env().APP_URL).origin);
    return putNote(
      new Request(`${env().APP_URL}/api/v1/sheets/${here.sheet.id}/notes/${A3}`, {
        method: "PUT",
        headers,
        body,
      }),
      { params: Promise.resolve({ id: here.sheet.id, midi: String(A3) }) },
    );
  };

  it("answers a signed-out save with 401 and words that promise nothing is lost", async () => {
    const response = await put(JSON.stringify({ readings: clean }));
    expect(response.status).toBe(401);
    expect(await response.json()).toMatchObject({
      code: "signed-out",
      detail: expect.stringContaining("still here"),
    });
  });

  it("stops a body of 5 MB, claimed or not, with 413", async () => {
    const { browser } = await newShop();
    const body = JSON.stringify({ readings: clean, remarks: "x".repeat(5 * 1024 * 1024) });
    const response = await put(body, browser.headers());
    expect(response.status).toBe(413);
    expect(response.headers.get("content-type")).toContain("application/problem+json");
    expect(await response.json()).toMatchObject({ code: "too-large" });
  });

  it("answers a foreign sheet with 404 and nonsense with the field it stands in", async () => {
    const { browser } = await newShop();
    expect((await put(JSON.stringify({ readings: clean }), browser.headers())).status).toBe(404);
    const nonsense = await put(JSON.stringify({ readings: [{ partial: 1, hz: "abc" }] }), browser.headers());
    expect(nonsense.status).toBe(422);
    expect(await nonsense.json()).toMatchObject({
      errors: [{ path: "readings.0.hz", message: "Not a number. Write 784.2." }],
    });
    expect((await put("{", browser.headers())).status).toBe(400);
  });
});
