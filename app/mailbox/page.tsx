import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { LocalMailFrame } from "@/components/people/local-mail-frame";
import { LeftPage, RightPage, Spread } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { cx } from "@/components/ui/class-names";
import { Disclosure } from "@/components/ui/disclosure";
import { Facts } from "@/components/ui/facts";
import { EmptyState, ErrorState } from "@/components/ui/states";
import { showInstant } from "@/lib/dates";
import { hasLocalMailbox, localMails } from "@/lib/mail/mailbox";

export const metadata: Metadata = { title: "Local mailbox" };

/** What the product would have mailed. A start on one machine delivers nothing; this page shows it instead. */
export default async function MailboxPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  if (!hasLocalMailbox()) notFound();
  const { id } = await searchParams;
  const mails = await localMails();
  const chosen = mails?.find((mail) => mail.id === id) ?? mails?.[0];
  return (
    <Spread
      left={
        <LeftPage
          title="Local mailbox"
          subtitle="Mail of this machine. Nothing here was delivered to anybody."
          fold={null}
        >
          {mails === null ? (
            <ErrorState
              title="The mailbox does not answer"
              action={<LinkButton href="/mailbox">Try again</LinkButton>}
            >
              It runs beside the server on this machine. Start both again if this stays.
            </ErrorState>
          ) : mails.length === 0 ? (
            <EmptyState title="No mail yet" action={<LinkButton href="/mailbox">Look again</LinkButton>}>
              Ask for a new password, or invite somebody: the mail appears here.
            </EmptyState>
          ) : (
            <nav aria-label="Mails">
              <p className="mb-2 flex items-center justify-between gap-3">
                <span className="lab">{mails.length === 1 ? "1 mail" : `${mails.length} mails`}</span>
                <LinkButton href="/mailbox" size="small">
                  Look again
                </LinkButton>
              </p>
              <ul className="border-t border-hairline max-lg:max-h-72 max-lg:overflow-y-auto">
                {mails.map((mail) => (
                  <li key={mail.id} className="border-b border-hairline">
                    <AppLink
                      href={`/mailbox?id=${mail.id}`}
                      aria-current={mail.id === chosen?.id ? "true" : undefined}
                      className={cx(
                        "block px-3 py-2 -outline-offset-2 hover:bg-cover",
                        mail.id === chosen?.id &&
                          "bg-brass-wash shadow-[inset_3px_0_0_var(--brass-fill)] hover:bg-brass-wash",
                      )}
                    >
                      <span className="block truncate font-medium">{mail.subject || "No subject"}</span>
                      <span className="lab flex justify-between gap-3">
                        <span className="truncate">{mail.to.join(", ")}</span>
                        <span className="shrink-0">{showInstant(mail.receivedAt, "en-GB", "UTC")} UTC</span>
                      </span>
                    </AppLink>
                  </li>
                ))}
              </ul>
            </nav>
          )}
        </LeftPage>
      }
      right={
        <RightPage>
          {chosen ? (
            <article aria-label={chosen.subject}>
              <h2 className="mt-4 mb-3 break-words">{chosen.subject || "No subject"}</h2>
              <Facts
                facts={[
                  { name: "To", value: chosen.to.join(", ") },
                  { name: "From", value: chosen.from },
                  { name: "Received", value: `${showInstant(chosen.receivedAt, "en-GB", "UTC")} UTC` },
                ]}
              />
              {chosen.html ? (
                <LocalMailFrame key={chosen.id} html={chosen.html} title={chosen.subject} />
              ) : null}
              <Disclosure label="As plain text" open={!chosen.html} className="mt-3">
                <pre className="max-w-180 font-sans text-16 break-words whitespace-pre-wrap">
                  {chosen.text}
                </pre>
              </Disclosure>
            </article>
          ) : (
            <p className="mt-6 text-ink-soft">Choose a mail to read it.</p>
          )}
        </RightPage>
      }
    />
  );
}
