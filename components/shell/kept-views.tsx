"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { AppLink } from "../ui/app-link";
import { cx } from "../ui/class-names";
import { PageSection } from "./page-section";

export type KeptView = { href: string; label: string };

/** Ways into a list that somebody asks for every week; each is nothing but an address. */
export function KeptViews({ views }: { views: readonly KeptView[] }) {
  const pathname = usePathname();
  const search = useSearchParams();
  const here = normal(`${pathname}?${search}`);
  return (
    <PageSection title="Views">
      <ul className="border-edge border-t">
        {views.map(({ href, label }) => {
          const on = normal(href) === here;
          return (
            <li key={href} className="border-hairline border-b">
              <AppLink
                href={href}
                aria-current={on ? "page" : undefined}
                className={cx(
                  "flex h-9 items-center touch:h-11",
                  on
                    ? "bg-brass-wash pl-3 font-semibold text-ink shadow-[inset_3px_0_0_var(--brass-fill)]"
                    : "text-ink-soft hover:text-ink",
                )}
              >
                {label}
              </AppLink>
            </li>
          );
        })}
      </ul>
    </PageSection>
  );
}

/** The same question asked in another order is the same view. */
function normal(href: string): string {
  const [path = "", query = ""] = href.split("?");
  const params = new URLSearchParams(query);
  params.sort();
  return `${path}?${params}`;
}
