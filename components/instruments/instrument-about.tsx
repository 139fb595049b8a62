import { HistoryString } from "@/components/charts/history-string";
import { PageSection } from "@/components/shell/page-section";
import { LeftPage } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { DemoBadge } from "@/components/ui/demo-badge";
import { Facts } from "@/components/ui/facts";
import { Note } from "@/components/ui/note";
import { StateWord } from "@/components/ui/state-word";
import { showDay, showDayOf } from "@/lib/dates";
import type { HistoryEntry } from "@/lib/instruments/history/rules";
import { kindLabels } from "@/lib/instruments/rules";
import type { InstrumentRecord } from "@/lib/instruments/schema";
import { BreakWords, KeysWords, temperamentWords } from "./instrument-words";

const inSight = 7;

/** The left page of an instrument: what it is, where it stands, and its history hung on the string at pitch. */
export function InstrumentAbout({
  instrument,
  history,
  clock,
}: {
  instrument: InstrumentRecord;
  history: readonly HistoryEntry[];
  clock: { locale: string; timeZone: string; demo: boolean };
}) {
  const { place } = instrument;
  const oldest = history.at(-1);
  return (
    <LeftPage
      crumb={[
        { label: "Instruments", href: "/instruments" },
        ...(place ? [{ label: place.siteName, href: `/sites/${place.siteId}` }] : []),
      ]}
      title={instrument.name}
      subtitle={[
        kindLabels[instrument.kind],
        instrument.year,
        instrument.serial && `no. ${instrument.serial}`,
      ]
        .filter(Boolean)
        .join(", ")}
      aside={clock.demo ? <DemoBadge /> : null}
    >
      {instrument.archivedAt ? (
        <StateWord kind="stopped">
          Archived {showDayOf(instrument.archivedAt, clock.locale, clock.timeZone)}
        </StateWord>
      ) : null}
      <Facts
        facts={[
          place !== null && {
            name: "Where",
            value: (
              <>
                <AppLink href={`/sites/${place.siteId}`} className="link">
                  {place.siteName}
                </AppLink>
                {instrument.room ? `, ${instrument.room}` : null}
              </>
            ),
          },
          place !== null && {
            name: "Owner",
            value: (
              <AppLink href={`/customers/${place.ownerId}`} className="link">
                {place.ownerName}
              </AppLink>
            ),
          },
          { name: "Keys", value: <KeysWords {...instrument} /> },
          { name: "Break", value: <BreakWords breakMidi={instrument.breakMidi} /> },
          {
            name: "Pitch",
            value: `A4 = ${instrument.referenceHz} Hz, ${temperamentWords(instrument.temperament).toLowerCase()}`,
          },
        ]}
      />
      <PageSection
        title="History"
        aside={
          oldest
            ? `${history.length} ${history.length === 1 ? "day" : "days"} since ${oldest.day.slice(0, 4)}`
            : undefined
        }
      >
        {history.length > 0 ? (
          <HistoryString
            entries={history.slice(0, inSight).map((entry) => ({
              ...entry,
              date: entry.visitId ? (
                <AppLink href={`/visits/${entry.visitId}`} className="hover:underline">
                  {showDay(entry.day, clock.locale)}
                </AppLink>
              ) : (
                showDay(entry.day, clock.locale)
              ),
            }))}
          />
        ) : (
          <p className="text-ink-soft">Nothing yet. The first reading sheet begins it.</p>
        )}
        {history.length > inSight ? (
          <AppLink href={`/instruments/${instrument.id}/visits`} className="link mt-3 inline-block">
            All {history.length}
          </AppLink>
        ) : null}
      </PageSection>
      {instrument.standingNote ? (
        <div className="border-t border-hairline pt-5">
          <Note quoted by="Standing note">
            {instrument.standingNote}
          </Note>
        </div>
      ) : null}
    </LeftPage>
  );
}
