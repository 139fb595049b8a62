import { LeftPage } from "@/components/shell/spread";
import { DemoBadge } from "@/components/ui/demo-badge";
import { Facts } from "@/components/ui/facts";
import { Note } from "@/components/ui/note";
import { StateWord } from "@/components/ui/state-word";
import type { CustomerRecord } from "@/lib/customers/schema";
import { showDayOf } from "@/lib/dates";

/** The left page of a customer: who it is and how to reach them. */
export function CustomerAbout({
  customer,
  clock,
}: {
  customer: CustomerRecord;
  clock: { locale: string; timeZone: string; demo: boolean };
}) {
  return (
    <LeftPage
      crumb={[{ label: "Customers", href: "/customers" }, { label: customer.name }]}
      title={customer.name}
      subtitle={customer.kind === "organisation" ? "Organisation" : "Person"}
      aside={clock.demo ? <DemoBadge /> : null}
    >
      {customer.archivedAt ? (
        <StateWord kind="stopped">
          Archived {showDayOf(customer.archivedAt, clock.locale, clock.timeZone)}
        </StateWord>
      ) : null}
      <Facts
        facts={[
          customer.contactName !== null && { name: "Contact", value: customer.contactName },
          {
            name: "Telephone",
            value: customer.phone ? (
              <a href={`tel:${customer.phone.replace(/[^+\d]/g, "")}`} className="link">
                {customer.phone}
              </a>
            ) : (
              <span className="text-ink-soft">not known</span>
            ),
          },
          {
            name: "E-mail",
            value: customer.email ? (
              <a href={`mailto:${customer.email}`} className="link">
                {customer.email}
              </a>
            ) : (
              <span className="text-ink-soft">not known</span>
            ),
          },
        ]}
      />
      {customer.notes ? <Note by="Notes, for the shop only">{customer.notes}</Note> : null}
    </LeftPage>
  );
}
