/** An instrument's history as its owner reads it: no partials, no notes, only how far it stood from pitch. */

type Pitch = { asFoundCents: number | null; asLeftCents: number | null };

/** Nearer than this nobody hears it from the chair. */
const atPitch = 1;

function standing(cents: number): string {
  const rounded = Math.round(Math.abs(cents));
  if (Math.abs(cents) < atPitch) return "at pitch";
  return `${rounded} ${rounded === 1 ? "cent" : "cents"} ${cents < 0 ? "below" : "above"} pitch`;
}

/** "It stood 6 cents below pitch when we came, and at pitch when we left." */
export function pitchSentence({ asFoundCents: found, asLeftCents: left }: Pitch): string {
  if (found !== null && left !== null) {
    const [came, went] = [standing(found), standing(left)];
    if (came === went) return `It stood ${came} when we came and when we left.`;
    return `It stood ${came} when we came, and ${went} when we left.`;
  }
  if (found !== null) return `It stood ${standing(found)} when we came.`;
  if (left !== null) return `It stood ${standing(left)} when we left.`;
  return "Its pitch was not measured.";
}

export function airSentence(humidityPercent: number | null): string | null {
  return humidityPercent === null
    ? null
    : `The air in the room was at ${Math.round(humidityPercent)} % humidity.`;
}
