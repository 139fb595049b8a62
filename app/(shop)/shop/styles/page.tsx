import type { Metadata } from "next";
import { WorkHead } from "@/components/shell/spread";
import { ArchiveStyle } from "@/components/styles/archive-style";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { StateWord } from "@/components/ui/state-word";
import { staffActor } from "@/lib/pages/page-actor";
import { builtInWords } from "@/lib/plans/rules";
import { getStyles } from "@/lib/plans/styles/service";
import { changeStyleAction } from "./actions";

export const metadata: Metadata = { title: "House styles" };

export default async function StylesPage() {
  const styles = await getStyles(await staffActor());
  return (
    <>
      <WorkHead
        title="House styles"
        summary="How the shop weighs the intervals when it stretches octaves. Everybody plans with them."
        actions={
          styles.canChange ? (
            <LinkButton kind="primary" href="/shop/styles/new">
              New style
            </LinkButton>
          ) : undefined
        }
      />
      <ul className="border-edge border-t">
        {styles.house.map((style) => (
          <li
            key={style.id}
            className="flex min-h-14 flex-wrap items-center justify-between gap-x-4 border-hairline border-b py-2"
          >
            <span>
              <AppLink
                href={`/shop/styles/${style.id}`}
                className="font-semibold text-16 touch:inline-flex touch:min-h-11 touch:items-center"
              >
                {style.name}
              </AppLink>
              <span className="block text-12 text-ink-soft">
                {style.intervals.length} intervals, smoothness {style.smoothness}
              </span>
            </span>
            <span className="flex items-center gap-3">
              {styles.defaultStyle === style.id ? <StateWord kind="done">the shop's habit</StateWord> : null}
              {styles.canChange && styles.defaultStyle !== style.id ? (
                <ArchiveStyle style={style} change={changeStyleAction} />
              ) : null}
            </span>
          </li>
        ))}
        {styles.builtIn.map(({ name, words }) => (
          <li
            key={name}
            className="flex min-h-14 flex-wrap items-center justify-between gap-x-4 border-hairline border-b py-2"
          >
            <span>
              <span className="font-semibold text-16">{builtInWords[name].title}</span>
              <span className="block text-12 text-ink-soft">{words}</span>
            </span>
            <span className="flex items-center gap-3 text-ink-soft">
              built in
              {styles.defaultStyle === name ? <StateWord kind="done">the shop's habit</StateWord> : null}
              {styles.canChange && name !== "published" ? (
                <AppLink
                  href={`/shop/styles/new?from=${name}`}
                  className="touch:inline-flex touch:min-h-11 touch:items-center"
                >
                  Start from it
                </AppLink>
              ) : null}
            </span>
          </li>
        ))}
      </ul>
    </>
  );
}
