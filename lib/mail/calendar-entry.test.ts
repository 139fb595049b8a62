import ICAL from "ical.js";
import { describe, expect, it } from "vitest";
import { type CalendarVisit, calendarEntry, calendarFeed } from "./calendar-entry";

const shop = { name: "Larch & Wren; Piano Service", email: "office@larchandwren.example" };
const customer = { name: "Ada Ashgrove", email: "customer@example.org" };
const stamp = "2026-05-01T08:00:00Z";
const visit: CalendarVisit = {
  uid: "6f0c1d0e-4a53-4f0e-9d6e-1f4f2a1f6a11",
  sequence: 0,
  state: "agreed",
  begins: "2026-05-14T07:00:00Z",
  ends: "2026-05-14T09:00:00Z",
  timeZone: "Europe/Berlin",
  summary: "Piano tuning",
  description: "Castellan 186.\nPlease keep the room quiet.",
  place: "Averil Conservatory, 1 Lantern Hill, Port Averil",
  position: { latitude: 52.3, longitude: -6.4 },
};

/** Read back by a parser that shares nothing with what writes. */
function read(text: string) {
  const calendar = new ICAL.Component(ICAL.parse(text));
  for (const zone of calendar.getAllSubcomponents("vtimezone")) {
    ICAL.TimezoneService.register(new ICAL.Timezone(zone));
  }
  const events = calendar.getAllSubcomponents("vevent").map((each) => new ICAL.Event(each));
  return { calendar, events };
}

function only(text: string) {
  const [event, ...more] = read(text).events;
  if (!event || more.length > 0) throw new Error("One event was expected");
  return event;
}

describe("the calendar entry of a mail", () => {
  it("is read back as it was meant by an independent parser", () => {
    const { method, text } = calendarEntry(visit, shop, customer, stamp);
    const event = only(text);
    expect(method).toBe("REQUEST");
    expect(read(text).calendar.getFirstPropertyValue("method")).toBe("REQUEST");
    expect(event.uid).toBe(visit.uid);
    expect(event.summary).toBe(visit.summary);
    expect(event.description).toBe(visit.description);
    expect(event.location).toBe(visit.place);
    expect(event.startDate.toString()).toBe("2026-05-14T09:00:00");
    expect(event.startDate.toJSDate().toISOString()).toBe("2026-05-14T07:00:00.000Z");
    expect(event.endDate.toJSDate().toISOString()).toBe("2026-05-14T09:00:00.000Z");
  });

  it("names the shop as organiser and asks for no reply through the calendar", () => {
    const event = only(calendarEntry(visit, shop, customer, stamp).text);
    const [attendee] = event.attendees;
    expect(event.organizer).toBe("mailto:office@larchandwren.example");
    expect(attendee?.getFirstValue()).toBe("MAILTO:customer@example.org");
    expect(attendee?.getParameter("rsvp")).toBe("FALSE");
    expect(attendee?.getParameter("partstat")).toBe("ACCEPTED");
  });

  it("is tentative while it is an offer, and its cancellation takes it away under the same name", () => {
    const offer = calendarEntry({ ...visit, state: "offered" }, shop, customer, stamp);
    expect(only(offer.text).component.getFirstPropertyValue("status")).toBe("TENTATIVE");
    const cancelled = calendarEntry({ ...visit, state: "cancelled", sequence: 2 }, shop, customer, stamp);
    const event = only(cancelled.text);
    expect(cancelled.method).toBe("CANCEL");
    expect([event.uid, event.sequence]).toEqual([visit.uid, 2]);
    expect(event.component.getFirstPropertyValue("status")).toBe("CANCELLED");
  });

  it("keeps the wall time of the night the clocks change", () => {
    // IANA tzdata, Europe/Berlin: on 29 March 2026 at 01:00 UTC the offset goes from +1 to +2 hours.
    const night = { ...visit, begins: "2026-03-29T00:30:00Z", ends: "2026-03-29T02:30:00Z" };
    const event = only(calendarEntry(night, shop, customer, stamp).text);
    expect(event.startDate.toString()).toBe("2026-03-29T01:30:00");
    expect(event.endDate.toString()).toBe("2026-03-29T04:30:00");
    expect(event.endDate.toJSDate().toISOString()).toBe("2026-03-29T02:30:00.000Z");
  });

  it("folds lines at 75 octets and never inside a character", () => {
    // RFC 5545, section 3.1.
    const place = `${"Größe ♯ 🎹 ".repeat(30)}end`;
    const { text } = calendarEntry({ ...visit, place }, shop, customer, stamp);
    const lines = text.split("\r\n");
    expect(Math.max(...lines.map((line) => Buffer.byteLength(line)))).toBeLessThanOrEqual(75);
    expect(text.replaceAll("\r\n", "")).not.toMatch(/[\r\n]/);
    expect(text).not.toContain("\ufffd");
    expect(only(text).location).toBe(place);
  });

  it("escapes text as RFC 5545, section 3.3.11, shows it", () => {
    const description = "Project XYZ Final Review\nConference Room - 3B\nCome Prepared.";
    const { text } = calendarEntry({ ...visit, description }, shop, customer, stamp);
    // The example of that section, unfolded.
    expect(text.replaceAll("\r\n ", "")).toContain(
      "DESCRIPTION:Project XYZ Final Review\\nConference Room - 3B\\nCome Prepared.",
    );
    const hostile = 'a\\b;c,d"e\r\nATTENDEE:mailto:evil@example.org\u0007';
    const event = only(
      calendarEntry({ ...visit, description: hostile, summary: hostile }, shop, customer, stamp).text,
    );
    expect(event.attendees).toHaveLength(1);
    expect(event.description).toBe('a\\b;c,d"e\nATTENDEE:mailto:evil@example.org ');
    expect(event.summary).not.toContain("\n");
  });
});

describe("a calendar feed", () => {
  const other = { ...visit, uid: "0b8f7c52-9a4f-4f6f-8a55-2f7a1a0f9a22", timeZone: "America/St_Johns" };

  it("holds every visit in its own time zone, with the rules of each, and invites nobody", () => {
    const text = calendarFeed("Ines Maroval", [visit, other], stamp);
    const { calendar, events } = read(text);
    expect(calendar.getFirstPropertyValue("method")).toBe("PUBLISH");
    expect(calendar.getAllSubcomponents("vtimezone")).toHaveLength(2);
    expect(events.map((event) => event.startDate.toJSDate().toISOString())).toEqual(
      [visit.begins, other.begins].map((at) => new Date(at).toISOString()),
    );
    expect(events.flatMap(({ attendees }) => attendees)).toEqual([]);
  });

  it("without visits is still a calendar", () => {
    expect(read(calendarFeed("Ines Maroval", [], stamp)).events).toEqual([]);
  });
});
