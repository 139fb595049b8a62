import { AppLink } from "@/components/ui/app-link";

/** Where mails of a start on this machine are found; nothing on a server that delivers them. */
export function MailboxLink({ href }: { href: string | null }) {
  if (!href) return null;
  return (
    <p>
      <AppLink href={href} className="link link-alone">
        Open the local mailbox
      </AppLink>
    </p>
  );
}
