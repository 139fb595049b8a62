import { readableText } from "@/lib/clean-text";

/**
 * Text that need not be given. An empty field means "not known", whether a form or a program sends it; a
 * field that is not mentioned stays as it is, so a change of one field never clears another.
 */
export function optionalText(most: number) {
  return readableText()
    .max(most, `At most ${most} characters.`)
    .transform((text) => (text === "" ? null : text))
    .nullable()
    .optional();
}

/** As `optionalText`, for a column that keeps an empty text rather than null. */
export function plainText(most: number) {
  return readableText().max(most, `At most ${most} characters.`).optional();
}
