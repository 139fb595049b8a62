import { Fragment } from "react";
import { AppLink } from "../ui/app-link";
import { Sign } from "../ui/sign";

export type CrumbStep = { label: string; href?: string };

/** Where this page hangs. On the phone only the way back: an arrow and the nearest place. */
export function Crumb({ steps }: { steps: readonly CrumbStep[] }) {
  const back = steps.findLast((step) => step.href);
  return (
    <nav aria-label="Where you are" className="lab mb-1 lg:mb-2" data-no-print>
      {back?.href ? (
        <AppLink
          href={back.href}
          className="-my-2 inline-flex h-11 items-center gap-1.5 text-14 text-ink-soft lg:hidden"
        >
          <Sign name="arrow-left" />
          {back.label}
        </AppLink>
      ) : null}
      <ol className={back ? "hidden flex-wrap lg:flex" : "flex flex-wrap"}>
        {steps.map((step, index) => (
          <Fragment key={step.href ?? step.label}>
            {index > 0 ? (
              <li aria-hidden="true" className="px-1">
                /
              </li>
            ) : null}
            <li>
              {step.href ? (
                <AppLink href={step.href} className="rounded-sm text-ink-soft hover:text-ink hover:underline">
                  {step.label}
                </AppLink>
              ) : (
                step.label
              )}
            </li>
          </Fragment>
        ))}
      </ol>
    </nav>
  );
}
