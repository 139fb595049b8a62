"use client";

import { usePathname } from "next/navigation";
import { useId } from "react";
import { AppLink } from "../ui/app-link";
import { cx } from "../ui/class-names";
import { Kbd } from "../ui/kbd";
import { type Account, AccountMenu } from "./account-menu";
import { currentHref, type Place } from "./current-item";
import { useLetterKeys } from "./letter-keys";
import { Mark } from "./mark";
import { useSlidingStud } from "./use-sliding-stud";

export type SpineProps = {
  items: readonly Place[];
  current?: string;
  /** The page that finds anything; the slash key opens the same over any page. */
  find?: { href: string };
  account: Account;
};

/** The book's spine at the left edge of the desk: words on a string, the stud at the place. */
export function Spine({ items, current, find, account }: SpineProps) {
  const pathname = usePathname();
  const chosen = current ?? currentHref(items, pathname);
  const list = useSlidingStud<HTMLUListElement>(chosen);
  const menuId = useId();
  const slash = useLetterKeys();

  return (
    <nav
      aria-label="Main"
      data-no-print
      className="relative z-20 hidden border-r border-edge bg-cover lg:block"
    >
      <div className="sticky top-0 flex h-dvh flex-col pt-6 pb-5">
        <AppLink
          href={items[0]?.href ?? "/"}
          className="mb-6 ml-5 w-8 rounded"
          aria-label="Agraffe, first page"
        >
          <Mark />
        </AppLink>
        {find ? (
          <AppLink
            href={find.href}
            aria-current={pathname === find.href ? "page" : undefined}
            aria-keyshortcuts={slash ? "/" : undefined}
            className="flex h-10 items-center gap-1.5 pl-5 font-text text-ink-soft -outline-offset-2 hover:text-ink aria-[current]:font-semibold aria-[current]:text-ink"
          >
            Find {slash ? <Kbd>/</Kbd> : null}
          </AppLink>
        ) : null}
        <ul ref={list}>
          {items.map((item) => {
            const on = item.href === chosen;
            return (
              <li key={item.href} className="relative">
                <AppLink
                  href={item.href}
                  aria-current={on ? "page" : undefined}
                  className={cx(
                    "flex h-10 items-center pl-5 -outline-offset-2",
                    on ? "font-semibold text-ink" : "font-text text-ink-soft hover:text-ink",
                  )}
                >
                  {item.label}
                  {item.count === undefined ? null : (
                    <span className="lab ml-1.5 font-normal">{item.count}</span>
                  )}
                </AppLink>
                {on ? (
                  <i data-stud="" aria-hidden="true" className="stud top-2 right-[-6px] h-6 w-[11px]" />
                ) : null}
              </li>
            );
          })}
        </ul>
        <button
          type="button"
          popoverTarget={menuId}
          className="mx-2 mt-auto rounded py-2 pr-1 pl-3 text-left text-12 hover:bg-paper"
        >
          <span className="block font-semibold">{account.person.name}</span>
          <span className="mt-1 block text-ink-soft">{account.shop.name}</span>
        </button>
        <div
          id={menuId}
          popover="auto"
          className="inset-auto bottom-20 left-3 m-0 w-64 rounded bg-sheet p-4 text-ink shadow-float"
        >
          <AccountMenu account={account} onFollow={() => document.getElementById(menuId)?.hidePopover()} />
        </div>
      </div>
    </nav>
  );
}
