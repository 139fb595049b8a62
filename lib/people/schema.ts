import { z } from "zod";
import { passwordFault } from "@/lib/auth/passwords";
import { requiredText } from "@/lib/clean-text";
import { country, locale, shopName, timeZone } from "@/lib/shop/schema";
import { versionSeen } from "@/lib/version";

const personName = requiredText(120, "Give your name.").regex(
  /^[^\p{Cc}\p{Cf}]*$/u,
  "Write your name on one line.",
);
const address = z
  .string()
  .trim()
  .toLowerCase()
  .pipe(z.email("Write an address like anna@example.org.").max(254, "At most 254 characters."));
const currentPassword = z.string().min(1, "Type your password.").max(1000);
/** The rules are the server's (lib/auth/passwords.ts): they depend on the person. */
const newPassword = z.string().min(1, "Choose a password.").max(1000, "Use at most 256 characters.");
/** For a person without a second step. The server asks once more, knowing names to keep out. */
const passwordAlone = newPassword.superRefine((password, context) => {
  const fault = passwordFault(password);
  if (fault) context.addIssue({ code: "custom", message: fault });
});
const next = z.string().max(2000).optional();

export const signInInput = z.object({ email: address, password: currentPassword, stay: z.boolean(), next });
export const codeInput = z.object({
  code: z
    .string()
    .transform((text) => text.replace(/\s/g, ""))
    .pipe(z.string().regex(/^\d{6}$/, "Type the six digits shown now.")),
  next,
});
export const recoveryCodeInput = z.object({
  code: z.string().trim().min(1, "Type one of your recovery codes.").max(40),
  next,
});

export const openShopInput = z.object({
  /** Made by the form, so that pressing twice opens one shop. */
  shopId: z.uuid(),
  shopName,
  country,
  timeZone,
  locale,
});
const signUpInput = openShopInput.extend({
  name: personName,
  email: address,
  password: passwordAlone,
});
export const signUpForm = signUpInput.extend({ next });

/** What the link in the mail needs. The password only in a browser other than the one that signed up. */
export const confirmInput = z.object({
  token: z.string().min(1).max(2000),
  password: z.string().max(1000).optional(),
});
export const confirmationRequest = z.object({ email: address });

export const resetRequest = z.object({ email: address });
export const resetInput = z.object({ token: z.string().min(1).max(200), password: newPassword });

const staffRole = z.enum(["owner", "office", "technician"]);
export const invitationInput = z
  .object({
    email: address,
    role: z.enum(["owner", "office", "technician", "customer"]),
    /** The customer a customer's sign-in stands for. */
    customerId: z.union([z.literal("").transform(() => null), z.uuid()]).nullish(),
  })
  .refine(({ role, customerId }) => role !== "customer" || Boolean(customerId), {
    path: ["customerId"],
    message: "Choose whose records this sign-in shows.",
  });
export const invitationId = z.object({ id: z.uuid() });

export const acceptAsNewInput = z.object({
  token: z.string().min(1).max(200),
  name: personName,
  password: passwordAlone,
});
export const acceptInput = z.object({ token: z.string().min(1).max(200) });

export const memberChange = z.object({
  id: z.uuid(),
  version: versionSeen,
  role: staffRole.optional(),
  bookable: z.boolean().optional(),
});
export const memberEnd = z.object({ id: z.uuid(), version: versionSeen });

export const nameInput = z.object({ name: personName });
export const passwordChange = z.object({ currentPassword, newPassword });
export const passwordCheck = z.object({ password: currentPassword });
export const sessionId = z.object({ id: z.uuid() });
export const shopChoice = z.object({ shopId: z.uuid() });

export const memberRecord = z.object({
  id: z.uuid(),
  name: z.string(),
  /** Null for readers who may not change the team. */
  email: z.string().nullable(),
  role: z.enum(["owner", "office", "technician", "customer"]),
  customerId: z.uuid().nullable(),
  customerName: z.string().nullable(),
  bookable: z.boolean(),
  endedAt: z.iso.datetime().nullable(),
  since: z.iso.datetime(),
  version: z.int(),
});
export const memberList = z.object({ items: z.array(memberRecord), next: z.null() });

export const invitationRecord = z.object({
  id: z.uuid(),
  email: z.string(),
  role: z.enum(["owner", "office", "technician", "customer"]),
  customerName: z.string().nullable(),
  invitedBy: z.string(),
  sentAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  expired: z.boolean(),
});

export const meRecord = z.object({
  personId: z.uuid(),
  memberId: z.uuid(),
  name: z.string(),
  role: z.enum(["owner", "office", "technician", "customer"]),
  shopId: z.uuid(),
  shopName: z.string(),
  customerId: z.uuid().nullable(),
});

export type MemberRecord = z.infer<typeof memberRecord>;
export type InvitationRecord = z.infer<typeof invitationRecord>;
export type InvitationInput = z.infer<typeof invitationInput>;
export type MemberChange = z.infer<typeof memberChange>;
export type OpenShopInput = z.infer<typeof openShopInput>;
export type SignUpForm = z.infer<typeof signUpForm>;
