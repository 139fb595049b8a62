import { LinkButton } from "../ui/button";
import { ActionStrip } from "./action-strip";

type Action = { href: string; label: string };

/** A page's one primary link, in the heading of the right page on the desk. */
export function NextAction({ href, label }: Action) {
  return (
    <LinkButton kind="primary" href={href} className="max-lg:hidden">
      {label}
    </LinkButton>
  );
}

/** The same under the thumb, where there is no desk. */
export function NextActionStrip({ href, label }: Action) {
  return (
    <ActionStrip>
      <LinkButton kind="primary" href={href}>
        {label}
      </LinkButton>
    </ActionStrip>
  );
}
