import { letter } from "@/lib/mail/layout";

/** Names nobody and nothing: whoever signed up may have typed somebody else's address. */
export function confirmAddressMail(input: { to: string; link: string }) {
  return letter({
    to: input.to,
    subject: "Confirm your address for Agraffe",
    heading: "Confirm your address",
    paragraphs: [
      "Somebody opened a book in Agraffe with this address. If it was you, the link goes on from there. It works once, for one day.",
      "If it was not you, leave this mail alone: without the link nothing can be done with your address.",
    ],
    button: { label: "Confirm the address", link: input.link },
    closing: "Agraffe, the service book of a piano-tuning business.",
  });
}
