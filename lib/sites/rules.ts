import type { FieldErrors } from "@/lib/errors";

/** A position is a pair: one of the two alone is a slip. */
export function positionFaults({
  latitude,
  longitude,
}: {
  latitude?: number | null;
  longitude?: number | null;
}): FieldErrors {
  const north = latitude ?? null;
  const east = longitude ?? null;
  if ((north === null) === (east === null)) return {};
  return north === null
    ? { latitude: "Give the latitude too, or leave both empty." }
    : { longitude: "Give the longitude too, or leave both empty." };
}

/** One line for envelopes and lists; parts that are not known leave no stray comma. */
export function addressLine(site: { street: string; postalCode: string; city: string }): string {
  return [site.street, [site.postalCode, site.city].filter(Boolean).join(" ")].filter(Boolean).join(", ");
}
