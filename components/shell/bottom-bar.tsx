"use client";

import { usePathname } from "next/navigation";
import { useEffect, useState } from "react";
import { AppLink } from "../ui/app-link";
import { cx } from "../ui/class-names";
import { Dialog } from "../ui/dialog";
import { type Account, AccountMenu } from "./account-menu";
import { currentHref, type Place } from "./current-item";
import { useSlidingStud } from "./use-sliding-stud";

const inBar = 3;
const place =
  "relative flex h-15 w-full items-center justify-center px-1 font-medium text-14 text-ink-soft -outline-offset-2 aria-[current]:font-semibold aria-[current]:text-ink";

/** The phone's and tablet's way round: three places and More, under the thumb. */
export function BottomBar({
  items,
  find,
  account,
  current,
}: {
  items: ReadonlyArray<Place & { phone?: boolean }>;
  find?: { href: string };
  account: Account;
  current?: string;
}) {
  const pathname = usePathname();
  const chosen = current ?? currentHref(items, pathname);
  const [open, setOpen] = useState(false);
  const flagged = items.filter((item) => item.phone);
  const first = (flagged.length > 0 ? flagged : items).slice(0, inBar);
  const rest = items.filter((item) => !first.includes(item));
  const inRest = rest.some((item) => item.href === chosen);
  const list = useSlidingStud<HTMLUListElement>(inRest ? "more" : chosen);
  const more: Place[] = find ? [{ href: find.href, label: "Find" }, ...rest] : rest;

  useEffect(() => setOpen(false), [pathname]);

  return (
    <nav
      aria-label="Main, short"
      data-bottom-bar=""
      data-no-print
      className="fixed inset-x-0 bottom-0 z-30 border-t border-edge bg-cover pb-[env(safe-area-inset-bottom)] lg:hidden"
    >
      <ul ref={list} className="mx-auto grid max-w-160 auto-cols-fr grid-flow-col">
        {first.map((item) => {
          const on = item.href === chosen;
          return (
            <li key={item.href} className="relative">
              <AppLink href={item.href} aria-current={on ? "page" : undefined} className={place}>
                {item.label}
              </AppLink>
              {on ? <BarStud /> : null}
            </li>
          );
        })}
        <li className="relative">
          <button
            type="button"
            aria-haspopup="dialog"
            aria-expanded={open}
            aria-current={inRest ? "true" : undefined}
            onClick={() => setOpen(true)}
            className={place}
          >
            More
          </button>
          {inRest ? <BarStud /> : null}
        </li>
      </ul>
      <Dialog open={open} onClose={() => setOpen(false)} title="More" place="sheet">
        <ul className="mt-3 mb-5 border-t border-hairline">
          {more.map((item) => (
            <li key={item.href} className="relative border-b border-hairline">
              <AppLink
                href={item.href}
                aria-current={item.href === chosen ? "page" : undefined}
                onClick={() => setOpen(false)}
                className={cx(
                  "-mx-4 flex h-13 items-center px-4 text-16",
                  item.href === chosen &&
                    "bg-brass-wash font-semibold shadow-[inset_3px_0_0_var(--brass-fill)]",
                )}
              >
                {item.label}
                {item.count === undefined ? null : (
                  <span className="ml-auto text-14 text-ink-soft">{item.count}</span>
                )}
              </AppLink>
            </li>
          ))}
        </ul>
        <AccountMenu account={account} onFollow={() => setOpen(false)} />
      </Dialog>
    </nav>
  );
}

function BarStud() {
  return <i data-stud="" aria-hidden="true" className="stud top-[-6px] left-1/2 -ml-3.5 h-[11px] w-7" />;
}
