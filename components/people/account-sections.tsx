import { PageSection } from "@/components/shell/page-section";
import type { ActionResult } from "@/lib/doors/action-result";
import type { AccountView } from "@/lib/pages/account-view";
import type { TwoStepSetup } from "@/lib/people/two-step/service";
import type { GoingOn } from "./go-to";
import { NameForm } from "./name-form";
import { PasswordForm } from "./password-form";
import { SessionList } from "./session-list";
import { ShopSwitch } from "./shop-switch";
import { TwoStep } from "./two-step";

type Act<T> = (input: unknown) => Promise<ActionResult<T>>;

export type AccountActions = {
  changeNameAction: Act<{ name: string }>;
  changePasswordAction: Act<null>;
  endSessionAction: Act<unknown>;
  endOtherSessionsAction: Act<unknown>;
  beginTwoStepAction: Act<TwoStepSetup>;
  confirmTwoStepAction: Act<null>;
  endTwoStepAction: Act<null>;
  newRecoveryCodesAction: Act<{ recoveryCodes: string[] }>;
  switchShopAction: GoingOn;
};

export function AccountSections({ account, actions }: { account: AccountView; actions: AccountActions }) {
  return (
    <div className="mt-5 grid max-w-160 gap-9">
      <PageSection title="Name">
        <NameForm key={account.name} action={actions.changeNameAction} name={account.name} />
      </PageSection>
      <PageSection title="Two-step sign-in">
        <TwoStep
          on={account.secondStep}
          beginAction={actions.beginTwoStepAction}
          confirmAction={actions.confirmTwoStepAction}
          endAction={actions.endTwoStepAction}
          newCodesAction={actions.newRecoveryCodesAction}
        />
      </PageSection>
      <PageSection title="Password">
        <PasswordForm
          action={actions.changePasswordAction}
          email={account.email}
          secondStep={account.secondStep}
        />
      </PageSection>
      <PageSection title="Where you are signed in">
        <SessionList
          sessions={account.sessions}
          endAction={actions.endSessionAction}
          endOthersAction={actions.endOtherSessionsAction}
        />
      </PageSection>
      <PageSection title="Your shops">
        <ShopSwitch shops={account.shops} action={actions.switchShopAction} />
      </PageSection>
    </div>
  );
}
