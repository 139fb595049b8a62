import { countryCodes, nearestLocale } from "./places";

export type Choice = { value: string; label: string };
export type ShopChoices = {
  countries: Choice[];
  timeZones: Choice[];
  /** The likeliest, from what the browser asks for. */
  country: string;
  locale: string;
};

/** Made on the server and handed to the form: browsers name countries differently from one another. */
export function shopChoices(acceptLanguage: string | null): ShopChoices {
  const wanted = acceptLanguage?.split(",")[0]?.split(";")[0]?.trim();
  const region = wanted?.split("-").at(-1)?.toUpperCase() ?? "";
  return {
    countries: countryChoices(),
    timeZones: timeZoneChoices(),
    country: countryCodes.includes(region) ? region : "GB",
    locale: nearestLocale(wanted),
  };
}

export function countryChoices(): Choice[] {
  const names = new Intl.DisplayNames("en-GB", { type: "region" });
  return countryCodes
    .map((value) => ({ value, label: names.of(value) ?? value }))
    .sort((a, b) => a.label.localeCompare(b.label, "en"));
}

export function timeZoneChoices(): Choice[] {
  return ["UTC", ...Intl.supportedValuesOf("timeZone")].map((value) => ({
    value,
    label: value.replaceAll("_", " ").replaceAll("/", " / "),
  }));
}

export function currencyChoices(codes: readonly string[]): Choice[] {
  const names = new Intl.DisplayNames("en-GB", { type: "currency" });
  return codes.map((value) => ({ value, label: `${value} · ${names.of(value) ?? value}` }));
}
