import { newId } from "@/lib/ids";
import { plainName } from "./plain-name";

type Core = { name: string; email: string; createdAt: Date; updatedAt: Date };

/** What signing up answers where nobody was made: field by field what it answers where somebody was. */
export function nobodyAs({ name, email, createdAt, updatedAt }: Core, id: string) {
  return {
    name: plainName(name),
    email,
    emailVerified: false,
    image: null,
    createdAt,
    updatedAt,
    twoFactorEnabled: false,
    id,
  };
}

export function nobody(name: string, email: string) {
  const now = new Date();
  return nobodyAs({ name, email, createdAt: now, updatedAt: now }, newId());
}
