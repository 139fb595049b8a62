/**
 * Password rules after NIST SP 800-63B-4: 15 characters alone, 8 beside a second step; no composition rules;
 * a blocklist of common, repeated and guessable ones, and the reason is said. Each code point counts one;
 * NFKC before hashing, so that the same keys typed on another machine give the same password.
 */
export const shortestAlone = 15;
export const shortestWithSecondStep = 8;
export const longest = 256;

const common = [
  "password",
  "passwort",
  "motdepasse",
  "contrasena",
  "qwertyuiop",
  "asdfghjkl",
  "zxcvbnm",
  "azertyuiop",
  "1234567890",
  "0123456789",
  "abcdefghijklmnopqrstuvwxyz",
  "iloveyou",
  "letmein",
  "welcome",
  "administrator",
  "correcthorsebatterystaple",
  "trustno1",
];

export function normalisePassword(password: string): string {
  return password.normalize("NFKC");
}

/** What is wrong with this password, in words, or null. `context` holds names a guesser would try. */
export function passwordFault(
  password: string,
  options: { secondStep?: boolean; context?: readonly string[] } = {},
): string | null {
  const text = normalisePassword(password);
  const length = [...text].length;
  const shortest = options.secondStep ? shortestWithSecondStep : shortestAlone;
  if (length < shortest) return `Use at least ${shortest} characters. A short sentence works well.`;
  if (length > longest) return `Use at most ${longest} characters.`;
  const plain = text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, "");
  if (new Set(plain).size < 5) return "This repeats a few characters. Choose something less regular.";
  if (/^(.{1,8})\1+$/u.test(plain)) return "This repeats one piece. Choose something less regular.";
  if (isRun(plain)) return "This is a run of neighbouring characters. Choose something less regular.";
  if (isGuessable(plain, common, shortest))
    return "This is built on one of the commonest passwords. Choose another.";
  const names = (options.context ?? [])
    .map((word) => word.toLowerCase().replace(/[^\p{L}\p{N}]/gu, ""))
    .filter((name) => name.length >= 4);
  if (isGuessable(plain, [...names, ...common], shortest))
    return "This is mostly your name, address or shop. Add words a stranger would not guess.";
  return null;
}

/** Whether so little is left beside known words and runs that knowing them gives the password away. */
function isGuessable(plain: string, words: readonly string[], shortest: number): boolean {
  const longestFirst = words.filter((word) => plain.includes(word)).sort((a, b) => b.length - a.length);
  if (longestFirst.length === 0) return false;
  const rest = longestFirst.reduce((left, word) => left.replaceAll(word, " "), plain);
  return withoutRuns(rest).replaceAll(" ", "").length < shortest / 2;
}

/** Takes out what counts up, counts down or repeats over four characters or more: "1234", "dcba", "1111". */
function withoutRuns(text: string): string {
  const characters = [...text];
  let kept = "";
  for (let at = 0; at < characters.length; ) {
    const length = runLength(characters, at);
    if (length < 4) kept += characters[at];
    at += length < 4 ? 1 : length;
  }
  return kept;
}

function runLength(characters: readonly string[], from: number): number {
  const step = stepAt(characters, from);
  if (!(Math.abs(step) <= 1)) return 1;
  let length = 2;
  while (stepAt(characters, from + length - 1) === step) length++;
  return length;
}

function stepAt(characters: readonly string[], at: number): number {
  const [here, next] = [characters[at]?.codePointAt(0), characters[at + 1]?.codePointAt(0)];
  return here === undefined || next === undefined ? Number.NaN : next - here;
}

function isRun(plain: string): boolean {
  const codes = [...plain].map((character) => character.codePointAt(0) ?? 0);
  const steps = codes.slice(1).map((code, index) => code - (codes[index] ?? 0));
  return steps.length > 0 && steps.filter((step) => Math.abs(step) === 1).length >= steps.length * 0.8;
}
