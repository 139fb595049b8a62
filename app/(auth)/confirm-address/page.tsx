import type { Metadata } from "next";
import { cookies } from "next/headers";
import { ConfirmAddressForm } from "@/components/people/confirm-address-form";
import { AuthPage } from "@/components/shell/auth-page";
import { LinkButton } from "@/components/ui/button";
import { StateWord } from "@/components/ui/state-word";
import { ErrorState } from "@/components/ui/states";
import { confirmationBehind } from "@/lib/people/confirmation/service";
import { signUpCookie } from "@/lib/people/sign-up/kept-sign-up";
import { confirmAddressAction } from "./actions";

export const metadata: Metadata = { title: "Confirm your address" };

/** Opening the link changes nothing: programs that look through mail open links too. The button confirms. */
export default async function ConfirmAddressPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { token } = await searchParams;
  const whole = typeof token === "string" ? token : "";
  const { name } = await signUpCookie();
  const confirmation = await confirmationBehind(whole, (await cookies()).get(name)?.value);
  const title = "Confirm your address";
  const signIn = <LinkButton href="/sign-in">Go to sign-in</LinkButton>;

  switch (confirmation.state) {
    case "dead":
      return (
        <AuthPage title={title}>
          <ErrorState title="This link does not work any more" action={signIn}>
            It works for one day, and only the one in the newest mail. Sign in to have another sent; if that
            fails too, sign up again.
          </ErrorState>
        </AuthPage>
      );
    case "done":
      return (
        <AuthPage title={title}>
          <div className="grid justify-items-start gap-4 text-16">
            <StateWord kind="done" wrap>
              This address is confirmed already. Sign in with it.
            </StateWord>
            {signIn}
          </div>
        </AuthPage>
      );
    case "open":
      return (
        <AuthPage title={title} subtitle="Then you are signed in, and your shop’s book opens.">
          <ConfirmAddressForm
            action={confirmAddressAction}
            token={whole}
            email={confirmation.email}
            sameBrowser={confirmation.sameBrowser}
          />
        </AuthPage>
      );
  }
}
