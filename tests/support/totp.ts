import { createHmac } from "node:crypto";

const alphabet = "ABCDEFGHIJKLMNOPQRSTUVWXYZ234567";

/** RFC 4648 base32, as authenticators are given the secret. */
export function fromBase32(text: string): Buffer {
  let bits = "";
  for (const character of text.replace(/[\s=]/g, "").toUpperCase())
    bits += alphabet.indexOf(character).toString(2).padStart(5, "0");
  return Buffer.from((bits.match(/.{8}/g) ?? []).map((byte) => Number.parseInt(byte, 2)));
}

/** RFC 6238 with SHA-1 and steps of 30 s: what an authenticator shows at this moment. */
export function totp(secret: Buffer, atSeconds: number, digits = 6): string {
  const counter = Buffer.alloc(8);
  counter.writeBigUInt64BE(BigInt(Math.floor(atSeconds / 30)));
  const mac = createHmac("sha1", secret).update(counter).digest();
  const offset = (mac.at(-1) ?? 0) & 0x0f;
  const number = mac.readUInt32BE(offset) & 0x7fffffff;
  return String(number % 10 ** digits).padStart(digits, "0");
}
