import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { CustomerAbout } from "@/components/customers/customer-about";
import { CustomerForm } from "@/components/customers/customer-form";
import { RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { may } from "@/lib/auth/access";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { changeCustomerAction } from "../../actions";
import { customerOf } from "../customer-of";

export const metadata: Metadata = { title: "Change a customer" };

export default async function EditCustomerPage({ params }: PageProps<"/customers/[id]/edit">) {
  const customer = await customerOf((await params).id);
  const actor = await staffActor();
  if (!may(actor.role, "customers.change")) redirect(`/customers/${customer.id}`);
  return (
    <Spread
      left={<CustomerAbout customer={customer} clock={await shopClock(actor)} />}
      right={
        <RightPage>
          <WorkHead title="Change the customer" />
          <CustomerForm action={changeCustomerAction} record={customer} />
        </RightPage>
      }
    />
  );
}
