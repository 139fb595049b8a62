import type { Role } from "@/lib/auth/access";

export const roleWords: Record<Role, string> = {
  owner: "Owner",
  office: "Office",
  technician: "Technician",
  customer: "Customer",
};

/** What a role can do, in the words of the one permission table. */
export const roleMeaning: Record<Role, string> = {
  owner: "Everything, the team and the shop’s settings included.",
  office: "Customers, instruments and visits; reads sheets and plans.",
  technician: "Own visits with their readings and plans; reads the rest.",
  customer: "Sees the own instruments and visits, and nothing else.",
};

/** As it stands in "invites you …". */
export const roleInvited: Record<Role, string> = {
  owner: "as an owner",
  office: "to work in the office",
  technician: "as a technician",
  customer: "to see your instruments and visits",
};
