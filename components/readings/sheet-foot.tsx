import { Kbd } from "@/components/ui/kbd";

/** The keys that read a sheet without the pointer. */
export function KeyWords() {
  const keys = [
    ["Enter", "next partial"],
    ["Tab", "next note"],
    ["Space", "keep or drop"],
  ] as const;
  return (
    <ul className="flex flex-wrap items-center gap-x-5 gap-y-1 text-12 text-ink-soft max-lg:hidden">
      {keys.map(([key, words]) => (
        <li key={key} className="flex items-center gap-2">
          <Kbd>{key}</Kbd> {words}
        </li>
      ))}
    </ul>
  );
}

/** The sheet as files for a spreadsheet or another program. */
export function Exports({ sheetId }: { sheetId: string }) {
  const at = `/api/v1/sheets/${sheetId}/export`;
  const links = [
    { what: "readings", format: "csv" },
    { what: "readings", format: "json" },
    { what: "fits", format: "csv" },
    { what: "fits", format: "json" },
  ] as const;
  return (
    <p className="flex flex-wrap items-center gap-x-4 gap-y-1 text-12 text-ink-soft">
      Export
      {links.map(({ what, format }) => (
        <a
          key={`${what} ${format}`}
          className="link touch:inline-flex touch:h-11 touch:items-center"
          href={`${at}?format=${format}&what=${what}`}
          download
        >
          {what} as {format.toUpperCase()}
        </a>
      ))}
    </p>
  );
}
