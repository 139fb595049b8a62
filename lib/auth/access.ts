/**
 * Who may do what: the one table, used by services, routes, actions, pages and buttons alike.
 * `all` reaches every record of the shop. `own` reaches: for a technician the visits they are on, with their
 * instruments and sheets; for a customer the records of that customer. The database walls off shops and
 * customers again, underneath.
 */
export type Role = "owner" | "office" | "technician" | "customer";
export type Scope = "all" | "own" | "none";

export const roles: readonly Role[] = ["owner", "office", "technician", "customer"];

const table = {
  //                        owner   office  technician customer
  "shop.read": ["all", "all", "all", "own"],
  "shop.change": ["all", "none", "none", "none"],
  "team.read": ["all", "all", "all", "none"],
  "team.change": ["all", "none", "none", "none"],
  "styles.read": ["all", "all", "all", "none"],
  "styles.change": ["all", "none", "none", "none"],
  "customers.read": ["all", "all", "all", "own"],
  "customers.change": ["all", "all", "none", "none"],
  "sites.read": ["all", "all", "all", "own"],
  "sites.change": ["all", "all", "none", "none"],
  "instruments.read": ["all", "all", "all", "own"],
  "instruments.create": ["all", "all", "none", "none"],
  "instruments.change": ["all", "all", "own", "none"],
  /** Archive, restore, move, sell: what concerns the customers more than the work. */
  "instruments.place": ["all", "all", "none", "none"],
  "search.read": ["all", "all", "all", "none"],
  "visits.read": ["all", "all", "all", "own"],
  "visits.change": ["all", "all", "own", "none"],
  "service-plans.read": ["all", "all", "all", "none"],
  "service-plans.change": ["all", "all", "none", "none"],
  "sheets.read": ["all", "all", "all", "none"],
  "sheets.change": ["all", "none", "own", "none"],
  "plans.read": ["all", "all", "all", "none"],
  "plans.change": ["all", "none", "own", "none"],
  "export.readings": ["all", "all", "all", "none"],
  /** A person's own account: name, password, sessions, two-step sign-in. */
  "account.change": ["own", "own", "own", "own"],
} as const satisfies Record<string, readonly [Scope, Scope, Scope, Scope]>;

export type Permission = keyof typeof table;

export function scopeOf(role: Role, permission: Permission): Scope {
  return table[permission][roles.indexOf(role)] ?? "none";
}

export function may(role: Role, permission: Permission): boolean {
  return scopeOf(role, permission) !== "none";
}
