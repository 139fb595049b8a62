import type { Metadata, Route } from "next";
import { cookies } from "next/headers";
import { redirect } from "next/navigation";
import { SecondStepForm } from "@/components/people/second-step-form";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { ownPath } from "@/lib/auth/next-path";
import { confirmCodeAction, confirmRecoveryCodeAction } from "./actions";

export const metadata: Metadata = { title: "Second step" };

export default async function SecondStepPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const query = await searchParams;
  const next = ownPath(query.next);
  const waiting = (await cookies()).getAll().some(({ name }) => name.endsWith("agraffe.two_factor"));
  if (!waiting) redirect(`/sign-in?next=${encodeURIComponent(next)}` as Route);
  const recovery = query.with === "recovery-code";
  const other = new URLSearchParams(recovery ? { next } : { next, with: "recovery-code" });
  return (
    <AuthPage
      title="Second step"
      subtitle={
        recovery
          ? "Type one of the recovery codes you kept. It works once."
          : "Type the six digits your authenticator shows for Agraffe."
      }
      footer={
        <div className="flex flex-wrap justify-between gap-3">
          <AppLink href={`/second-step?${other}`} className="link link-alone">
            {recovery ? "Use the authenticator" : "Use a recovery code"}
          </AppLink>
          <AppLink href="/sign-in" className="link link-alone">
            Begin again
          </AppLink>
        </div>
      }
    >
      <SecondStepForm
        key={recovery ? "recovery" : "code"}
        recovery={recovery}
        action={recovery ? confirmRecoveryCodeAction : confirmCodeAction}
        next={next}
      />
    </AuthPage>
  );
}
