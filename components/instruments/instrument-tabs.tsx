import { Tabs } from "@/components/shell/tabs";

/** The pages about one instrument. */
export function InstrumentTabs({ id, name }: { id: string; name: string }) {
  const at = `/instruments/${id}`;
  return (
    <Tabs
      label={name}
      items={[
        { href: at, label: "Inharmonicity", exact: true },
        { href: `${at}/stretch`, label: "Stretch plan" },
        { href: `${at}/sheets`, label: "Reading sheets" },
        { href: `${at}/compare`, label: "Compare" },
        { href: `${at}/record`, label: "Record" },
        { href: `${at}/visits`, label: "Visits" },
      ]}
    />
  );
}
