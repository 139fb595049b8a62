import { LeftPage } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { DemoBadge } from "@/components/ui/demo-badge";
import { Facts } from "@/components/ui/facts";
import { Note } from "@/components/ui/note";
import { StateWord } from "@/components/ui/state-word";
import { showDayOf } from "@/lib/dates";
import type { SiteRecord } from "@/lib/sites/schema";

/** The left page of a site: the address, whose it is and how to get in. */
export function SiteAbout({
  site,
  clock,
}: {
  site: SiteRecord;
  clock: { locale: string; timeZone: string; country: string; demo: boolean };
}) {
  const town = [site.postalCode, site.city].filter(Boolean).join(" ");
  return (
    <LeftPage
      crumb={[
        { label: "Customers", href: "/customers" },
        { label: site.customerName, href: `/customers/${site.customerId}` },
      ]}
      title={site.name}
      subtitle={town || "Site"}
      aside={clock.demo ? <DemoBadge /> : null}
    >
      {site.archivedAt ? (
        <StateWord kind="stopped">
          Archived {showDayOf(site.archivedAt, clock.locale, clock.timeZone)}
        </StateWord>
      ) : null}
      <Facts
        facts={[
          {
            name: "Customer",
            value: (
              <AppLink href={`/customers/${site.customerId}`} className="link">
                {site.customerName}
              </AppLink>
            ),
          },
          {
            name: "Address",
            value:
              site.street || town ? (
                <>
                  {site.street}
                  {site.street && town ? <br /> : null}
                  {town}
                </>
              ) : (
                <span className="text-ink-soft">not known</span>
              ),
          },
          site.country !== clock.country && { name: "Country", value: countryName(site.country) },
          site.timeZone !== clock.timeZone && {
            name: "Time zone",
            value: site.timeZone.replaceAll("_", " "),
          },
          site.latitude !== null && {
            name: "Position",
            value: `${site.latitude.toFixed(5)}, ${site.longitude?.toFixed(5)}`,
          },
        ]}
      />
      {site.accessNotes ? <Note by="Getting in">{site.accessNotes}</Note> : null}
    </LeftPage>
  );
}

function countryName(code: string): string {
  return new Intl.DisplayNames("en-GB", { type: "region" }).of(code) ?? code;
}
