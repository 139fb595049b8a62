/** Numbers as the screens print them: fixed decimals, a true minus, units said by the column or the label. */

const MINUS = "−";
const NOTHING = "–";

function digits(value: number, decimals: number): { text: string; sign: -1 | 0 | 1 } {
  const text = Math.abs(value).toFixed(decimals);
  return { text, sign: Number(text) === 0 ? 0 : value < 0 ? -1 : 1 };
}

/** "−1.40", never "−0.00"; a dash where there is no number. */
export function fixed(value: number | null | undefined, decimals: number): string {
  if (value == null || !Number.isFinite(value)) return NOTHING;
  const { text, sign } = digits(value, decimals);
  return sign < 0 ? MINUS + text : text;
}

/** "+3.8", "−6.4"; what rounds to zero carries no sign. */
export function signed(value: number | null | undefined, decimals = 1): string {
  if (value == null || !Number.isFinite(value)) return NOTHING;
  const { text, sign } = digits(value, decimals);
  return sign === 0 ? text : (sign < 0 ? MINUS : "+") + text;
}

export function signedCents(value: number | null | undefined): string {
  return signed(value, 1);
}

/** " ± 0.2", or nothing when the number is exact or its error unknown. */
function plusMinus(half: number | null | undefined, decimals: number): string {
  return half == null || !Number.isFinite(half) ? "" : ` ± ${Math.abs(half).toFixed(decimals)}`;
}

/** "−1.4 ± 0.2" */
export function centsWithBand(value: number | null | undefined, half: number | null | undefined): string {
  const text = signed(value, 1);
  return text === NOTHING ? text : text + plusMinus(half, 1);
}

/** "+38 ± 8 %" */
export function percentWithBand(value: number | null | undefined, half?: number | null): string {
  const text = signed(value, 0);
  return text === NOTHING ? text : `${text}${plusMinus(half, 0)} %`;
}

/** "138.48" */
export function hertz(value: number | null | undefined, decimals = 2): string {
  return fixed(value, decimals);
}

/** The power of ten under which B prints with one digit before the point: −4 for 2.1 × 10⁻⁴. */
export function exponentOfB(b: number): number {
  const size = Math.abs(b);
  if (!Number.isFinite(size) || size === 0) return -4;
  // The allowance keeps 0.001, whose logarithm is not quite −3 in binary, from printing as 10.0 × 10⁻⁴.
  return Math.min(-1, Math.max(-6, Math.floor(Math.log10(size) + 1e-9)));
}

/** "2.12 ± 0.18" in units of 10 to the exponent, −4 unless said otherwise; two figures after the point below 10. */
export function inharmonicity(b: number | null | undefined, half?: number | null, exponent = -4): string {
  if (b == null || !Number.isFinite(b)) return NOTHING;
  const unit = 10 ** exponent;
  const decimals = Math.abs(b / unit) < 9.995 ? 2 : 1;
  return fixed(b / unit, decimals) + plusMinus(half == null ? null : half / unit, decimals);
}

/** 0.0001 as "0.0001": the labels of a logarithmic axis, never in powers. */
export function plainDecimal(value: number): string {
  if (value >= 1) return fixed(value, 0);
  return fixed(value, Math.min(8, Math.ceil(-Math.log10(value) - 1e-9)));
}

/** For a spreadsheet: ASCII minus, no thousands separator, no sign on positive numbers. */
export function copyable(value: number | null | undefined, decimals: number): string {
  if (value == null || !Number.isFinite(value)) return "";
  return fixed(value, decimals).replace(MINUS, "-");
}
