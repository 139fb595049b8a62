import { AppLink } from "@/components/ui/app-link";
import { Button } from "@/components/ui/button";
import { Sign } from "@/components/ui/sign";

type Site = {
  id: string;
  name: string;
  street: string;
  city: string;
  customerName: string;
  instruments: number;
};

/** Finds the site of a new visit. An ordinary form: the question and its answer live in the address. */
export function SitePicker({
  q,
  date,
  sites,
  more,
}: {
  q: string;
  date: string;
  sites: readonly Site[];
  more: boolean;
}) {
  const keep = date ? `&date=${encodeURIComponent(date)}` : "";
  return (
    <div className="max-w-160">
      <form action="/visits/new" className="mb-3 flex gap-2">
        <span className="field-box">
          <Sign name="find" className="text-ink-soft" />
          <input
            type="search"
            name="q"
            defaultValue={q}
            aria-label="Find a site"
            placeholder="Find a site"
            autoComplete="off"
            className="w-full min-w-0 border-0 bg-transparent text-16 outline-none"
          />
        </span>
        {date ? <input type="hidden" name="date" value={date} /> : null}
        <Button type="submit" className="h-11!">
          Find
        </Button>
      </form>
      {sites.length > 0 ? (
        <ul className="border-t border-edge!">
          {sites.map((site) => (
            <li key={site.id}>
              <AppLink
                href={`/visits/new?site=${site.id}${keep}`}
                className="grid min-h-13 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-hairline py-1.5 hover:bg-cover"
              >
                <span className="truncate text-16 font-medium">{site.name}</span>
                <span className="lab justify-self-end">
                  {site.instruments === 1 ? "1 instrument" : `${site.instruments} instruments`}
                </span>
                <span className="lab truncate">
                  {[site.street, site.city].filter(Boolean).join(", ") || site.customerName}
                </span>
                <span className="lab truncate justify-self-end">{site.customerName}</span>
              </AppLink>
            </li>
          ))}
        </ul>
      ) : null}
      {more ? (
        <p className="lab mt-2">There are more: type some letters of the name, street or town.</p>
      ) : null}
    </div>
  );
}
