import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { CustomerForm } from "@/components/customers/customer-form";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { may } from "@/lib/auth/access";
import { newId } from "@/lib/ids";
import { staffActor } from "@/lib/pages/page-actor";
import { createCustomerAction } from "../actions";

export const metadata: Metadata = { title: "New customer" };

export default async function NewCustomerPage() {
  const actor = await staffActor();
  if (!may(actor.role, "customers.change")) redirect("/customers");
  return (
    <Spread
      left={
        <LeftPage
          crumb={[{ label: "Customers", href: "/customers" }, { label: "New" }]}
          title="New customer"
          subtitle="Sites and instruments are added to it next."
        />
      }
      right={
        <RightPage>
          <WorkHead title="Who it is" />
          <CustomerForm action={createCustomerAction} newId={newId()} />
        </RightPage>
      }
    />
  );
}
