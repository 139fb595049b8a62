import { z } from "zod";
import { requiredText } from "@/lib/clean-text";
import { isTimeZone } from "@/lib/dates";
import { versionSeen } from "@/lib/version";
import { countryCodes, currencyCodes, locales } from "./places";

export const shopName = requiredText(120, "Give the shop a name.").regex(
  /^[^\p{Cc}]*$/u,
  "Write the name on one line.",
);
export const timeZone = z.string().max(60).refine(isTimeZone, "Choose a time zone from the list.");
export const country = z.string().refine((code) => countryCodes.includes(code), "Choose a country.");
const currency = z.string().refine((code) => currencyCodes.includes(code), "Choose a currency.");
export const locale = z
  .string()
  .refine((code) => locales.some(({ value }) => value === code), "Choose how dates are written.");

export const shopFields = z.object({
  name: shopName,
  timeZone,
  country,
  currency,
  locale,
  referenceHz: z
    .number("Write a number, such as 440.")
    .min(380, "Between 380 and 480 Hz.")
    .max(480, "Between 380 and 480 Hz."),
  /** A built-in style's name or a house style's id. */
  defaultStyle: z.string().min(1, "Choose a style.").max(60),
});

export const shopChange = shopFields.partial().extend({ version: versionSeen });

export const shopRecord = shopFields.extend({
  id: z.uuid(),
  demo: z.boolean(),
  updatedAt: z.iso.datetime(),
  version: z.int(),
});

export type ShopFields = z.infer<typeof shopFields>;
export type ShopChange = z.infer<typeof shopChange>;
export type ShopRecord = z.infer<typeof shopRecord>;
