import { TZDate } from "@date-fns/tz";
import ical, {
  ICalAttendeeRole,
  ICalAttendeeStatus,
  type ICalCalendar,
  ICalCalendarMethod,
  ICalEventStatus,
} from "ical-generator";
import { tzlib_get_ical_block } from "timezones-ical-library";

/** A visit as a calendar shows it. Times are instants; they are written as wall time of the site's zone. */
export type CalendarVisit = {
  /** The same for the whole life of the appointment, and naming neither host nor person (RFC 7986). */
  uid: string;
  /** Counted up by every change the customer is told of (RFC 5546). */
  sequence: number;
  state: "offered" | "agreed" | "cancelled";
  begins: string;
  ends: string;
  timeZone: string;
  summary: string;
  description: string;
  place: string;
  position: { latitude: number; longitude: number } | null;
};

export type Party = { name: string; email: string };

const productId = "-//Agraffe//Service book//EN";

const statuses = {
  offered: ICalEventStatus.TENTATIVE,
  agreed: ICalEventStatus.CONFIRMED,
  cancelled: ICalEventStatus.CANCELLED,
};

/** The entry a mail carries (iMIP, RFC 6047): it asks for a place in the calendar, or takes it away. */
export function calendarEntry(visit: CalendarVisit, shop: Party, customer: Party, stamp: string) {
  const method = visit.state === "cancelled" ? ICalCalendarMethod.CANCEL : ICalCalendarMethod.REQUEST;
  const calendar = emptyCalendar(visit.timeZone).method(method);
  // Answers come by the mail's own links: a calendar's reply would reach the shop unproven.
  addVisit(calendar, visit, stamp)
    .organizer({ name: plainLine(shop.name), email: shop.email })
    .createAttendee({
      name: plainLine(customer.name),
      email: customer.email,
      role: ICalAttendeeRole.REQ,
      status: visit.state === "agreed" ? ICalAttendeeStatus.ACCEPTED : ICalAttendeeStatus.NEEDSACTION,
      rsvp: false,
    });
  return { method, text: calendar.toString() };
}

/** A feed somebody subscribes to (RFC 5545, published: it names nobody as invited). */
export function calendarFeed(name: string, visits: readonly CalendarVisit[], stamp: string): string {
  const calendar = emptyCalendar(visits[0]?.timeZone)
    .method(ICalCalendarMethod.PUBLISH)
    .name(plainLine(name))
    .ttl(15 * 60);
  for (const visit of visits) addVisit(calendar, visit, stamp);
  return calendar.toString();
}

/** The rules of every zone an event hangs in are written once. */
function emptyCalendar(timeZone: string | undefined): ICalCalendar {
  const calendar = ical({ prodId: productId });
  return timeZone ? calendar.timezone({ name: timeZone, generator: timeZoneBlock }) : calendar;
}

function timeZoneBlock(zone: string): string {
  const [block] = tzlib_get_ical_block(zone);
  if (!block) throw new RangeError(`No rules are known for the time zone ${zone}`);
  return block;
}

function addVisit(calendar: ICalCalendar, visit: CalendarVisit, stamp: string) {
  return calendar.createEvent({
    id: visit.uid,
    sequence: visit.sequence,
    stamp: new Date(stamp),
    start: new TZDate(new Date(visit.begins).getTime(), visit.timeZone),
    end: new TZDate(new Date(visit.ends).getTime(), visit.timeZone),
    timezone: visit.timeZone,
    status: statuses[visit.state],
    summary: plainLine(visit.summary),
    description: plainText(visit.description),
    location: {
      title: plainLine(visit.place),
      ...(visit.position ? { geo: { lat: visit.position.latitude, lon: visit.position.longitude } } : {}),
    },
  });
}

/** No control characters but the line break: the standard's text has no place for them. */
function plainText(text: string): string {
  return text.replace(/\r\n?/g, "\n").replace(/(?!\n)\p{Cc}/gu, " ");
}

function plainLine(text: string): string {
  return plainText(text).replace(/\n+/g, " ").trim();
}
