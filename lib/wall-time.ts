/**
 * Wall time ("2026-05-14T09:00"), the zone it hangs in, and the instant they mean together. Where clocks go
 * back a wall time occurs twice; `fold` is 0 for the first and 1 for the second.
 */
export type WallTime = string;
export type Fold = 0 | 1;

export type OffsetTime = { wall: WallTime; offsetMinutes: number };

const pattern = /^((?:19|2[01])\d{2}-\d{2}-\d{2})T(\d{2}:\d{2})(?::00(?:\.0+)?)?(Z|[+-]\d{2}:\d{2})$/i;
const wallPattern = /^(?:19|2[01])\d{2}-\d{2}-\d{2}T\d{2}:\d{2}$/;
const minute = 60_000;
const day = 24 * 60 * minute;

/** Reads RFC 3339 in whole minutes, keeping the wall time and the offset apart; null when it is no such time. */
export function parseOffsetTime(text: string): OffsetTime | null {
  const match = pattern.exec(text);
  const [, date, time, zone] = match ?? [];
  if (!date || !time || !zone) return null;
  const wall = `${date}T${time}`;
  if (!isWallTime(wall)) return null;
  if (/^z$/i.test(zone)) return { wall, offsetMinutes: 0 };
  const hours = Number(zone.slice(1, 3));
  const minutes = Number(zone.slice(4, 6));
  if (hours > 23 || minutes > 59) return null;
  return { wall, offsetMinutes: (zone.startsWith("-") ? -1 : 1) * (hours * 60 + minutes) };
}

export function isWallTime(text: string): boolean {
  if (!wallPattern.test(text)) return false;
  const at = Date.parse(`${text}Z`);
  return Number.isFinite(at) && wallText(at) === text;
}

/**
 * The offsets from UTC, in minutes, at which a zone's clocks show this wall time: none where they jump over
 * it, two where it occurs twice (the first occurrence first).
 */
export function offsetsAt(wall: WallTime, timeZone: string): number[] {
  const naive = Date.parse(`${wall}Z`);
  const near = new Set([naive - day, naive, naive + day].map((at) => offsetOf(at, timeZone)));
  return [...near]
    .filter((offset) => offsetOf(naive - offset * minute, timeZone) === offset)
    .sort((one, other) => other - one);
}

/** RFC 3339 with the zone's offset. A time the clocks jump over is read with the offset before the jump. */
export function withOffset(wall: WallTime, timeZone: string, fold: Fold): string {
  const offsets = offsetsAt(wall, timeZone);
  const offset = offsets[fold] ?? offsets[0] ?? offsetOf(Date.parse(`${wall}Z`) - day, timeZone);
  return `${wall}:00${offsetText(offset)}`;
}

export function offsetText(minutes: number): string {
  const size = Math.abs(minutes);
  const two = (value: number) => String(value).padStart(2, "0");
  return `${minutes < 0 ? "-" : "+"}${two(Math.floor(size / 60))}:${two(size % 60)}`;
}

/** What a zone's clocks show at an instant, to the minute. */
export function wallTimeOf(instant: Date, timeZone: string): WallTime {
  return wallText(
    Math.floor(instant.getTime() / minute) * minute + offsetOf(instant.getTime(), timeZone) * minute,
  );
}

export function addMinutes(wall: WallTime, minutes: number): WallTime {
  return wallText(Date.parse(`${wall}Z`) + minutes * minute);
}

/** Minutes since midnight. */
export function minuteOfDay(wall: WallTime): number {
  return Number(wall.slice(11, 13)) * 60 + Number(wall.slice(14, 16));
}

export function timeOfMinute(minutes: number): string {
  return wallText(minutes * minute).slice(11);
}

function wallText(naive: number): WallTime {
  return new Date(naive).toISOString().slice(0, 16);
}

const clocks = new Map<string, Intl.DateTimeFormat>();

function offsetOf(instant: number, timeZone: string): number {
  let clock = clocks.get(timeZone);
  if (!clock) {
    clock = new Intl.DateTimeFormat("en-u-ca-iso8601", {
      timeZone,
      hourCycle: "h23",
      year: "numeric",
      month: "2-digit",
      day: "2-digit",
      hour: "2-digit",
      minute: "2-digit",
    });
    clocks.set(timeZone, clock);
  }
  const part = Object.fromEntries(clock.formatToParts(instant).map(({ type, value }) => [type, value]));
  const shown = Date.parse(`${part.year}-${part.month}-${part.day}T${part.hour}:${part.minute}Z`);
  return Math.round((shown - Math.floor(instant / minute) * minute) / minute);
}
