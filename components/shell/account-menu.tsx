import type { ReactNode } from "react";
import { AppLink } from "../ui/app-link";
import type { Place } from "./current-item";
import { LetterKeysSwitch } from "./letter-keys-switch";
import { ThemeSwitch } from "./theme-switch";

export type Account = {
  person: { name: string; role?: string };
  shop: { name: string };
  /** Pages about the person: their sign-in, sessions, two-step sign-in. */
  links?: readonly Place[];
  /** A form whose button signs out. */
  signOut?: ReactNode;
};

/** What belongs to the person at the desk; in the spine's menu and in the phone's More. */
export function AccountMenu({ account, onFollow }: { account: Account; onFollow?: () => void }) {
  return (
    <div className="grid gap-3">
      <div>
        <div className="font-semibold">{account.person.name}</div>
        <div className="lab">
          {account.person.role ? `${account.person.role}, ` : null}
          {account.shop.name}
        </div>
      </div>
      {account.links?.length ? (
        <ul className="border-t border-hairline">
          {account.links.map((link) => (
            <li key={link.href} className="border-b border-hairline">
              <AppLink
                href={link.href}
                onClick={onFollow}
                className="flex h-9 items-center hover:bg-cover touch:h-11 touch:text-16"
              >
                {link.label}
              </AppLink>
            </li>
          ))}
        </ul>
      ) : null}
      <ThemeSwitch />
      <LetterKeysSwitch />
      {account.signOut ? <div className="border-t border-hairline pt-3">{account.signOut}</div> : null}
    </div>
  );
}
