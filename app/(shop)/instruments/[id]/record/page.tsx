import type { Metadata } from "next";
import { ServicePlanSection } from "@/components/diary/service-plan-section";
import { InstrumentForm } from "@/components/instruments/instrument-form";
import { BreakWords, KeysWords, temperamentWords } from "@/components/instruments/instrument-words";
import { PlaceSection } from "@/components/instruments/place-section";
import { StringsTable } from "@/components/instruments/strings-table";
import { ArchiveButton } from "@/components/records/archive-button";
import { PageSection } from "@/components/shell/page-section";
import { WorkHead } from "@/components/shell/spread";
import { Disclosure } from "@/components/ui/disclosure";
import { Facts } from "@/components/ui/facts";
import { may } from "@/lib/auth/access";
import { showDayOf } from "@/lib/dates";
import { getServicePlan } from "@/lib/diary/service-plans/service";
import { newId } from "@/lib/ids";
import { findHoldings } from "@/lib/instruments/holdings/service";
import { instrumentKeys } from "@/lib/instruments/keys";
import { kindLabels } from "@/lib/instruments/rules";
import type { InstrumentRecord } from "@/lib/instruments/schema";
import { findStrings } from "@/lib/instruments/strings/service";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { bookableTechnicians } from "@/lib/visits/booking/service";
import {
  archiveInstrumentAction,
  changeInstrumentAction,
  correctPlaceAction,
  moveInstrumentAction,
  removeServicePlanAction,
  removeStringAction,
  saveServicePlanAction,
  saveStringAction,
  saveStringsAction,
} from "../../actions";
import { instrumentOf } from "../instrument-of";

export const metadata: Metadata = { title: "Record" };

export default async function InstrumentRecordPage({ params }: PageProps<"/instruments/[id]/record">) {
  const instrument = await instrumentOf((await params).id);
  const actor = await staffActor();
  const [clock, holdings, strings, servicePlan, technicians] = await Promise.all([
    shopClock(actor),
    findHoldings(actor, instrument.id),
    findStrings(actor, instrument.id),
    getServicePlan(actor, instrument.id),
    bookableTechnicians(actor),
  ]);
  const mayPlace = may(actor.role, "instruments.place");
  return (
    <>
      <WorkHead
        title="Record"
        summary={`Changed ${showDayOf(instrument.updatedAt, clock.locale, clock.timeZone)}`}
        actions={
          mayPlace ? (
            <ArchiveButton
              record={instrument}
              action={archiveInstrumentAction}
              listKey={instrumentKeys.all}
              listHref="/instruments"
              words={["instrument", "instruments"]}
              locale={clock.locale}
            />
          ) : null
        }
      />
      <div className="grid gap-10">
        {instrument.canChange ? (
          // A saved record comes back under its new version, and the form begins again from it.
          <InstrumentForm key={instrument.version} action={changeInstrumentAction} record={instrument} />
        ) : (
          <ReadOnlyFacts instrument={instrument} />
        )}
        <PlaceSection
          instrument={instrument}
          earlier={holdings.items.filter((holding) => holding.until !== null)}
          mayMove={mayPlace}
          newId={newId()}
          today={clock.today}
          locale={clock.locale}
          move={moveInstrumentAction}
          correct={correctPlaceAction}
        />
        <ServicePlanSection
          instrumentId={instrument.id}
          plan={servicePlan}
          change={may(actor.role, "service-plans.change")}
          technicians={technicians}
          locale={clock.locale}
          save={saveServicePlanAction}
          remove={removeServicePlanAction}
        />
        <PageSection
          title="Strings"
          aside={strings.items.length > 0 ? `${strings.items.length} notes` : undefined}
        >
          {strings.items.length > 0 || instrument.canChange ? (
            <Disclosure label="Note by note" open={strings.items.length > 0}>
              <StringsTable
                key={`${instrument.firstMidi}-${instrument.lastMidi}`}
                instrument={instrument}
                saved={strings.items}
                canChange={instrument.canChange}
                actions={{ save: saveStringAction, saveAll: saveStringsAction, remove: removeStringAction }}
              />
            </Disclosure>
          ) : (
            <p className="text-ink-soft">Nobody has measured them yet.</p>
          )}
        </PageSection>
      </div>
    </>
  );
}

function ReadOnlyFacts({ instrument }: { instrument: InstrumentRecord }) {
  return (
    <div>
      <Facts
        facts={[
          { name: "Maker", value: instrument.maker },
          instrument.model !== "" && { name: "Model", value: instrument.model },
          instrument.serial !== "" && { name: "Serial", value: instrument.serial },
          instrument.year !== null && { name: "Year", value: instrument.year },
          { name: "Kind", value: kindLabels[instrument.kind] },
          instrument.room !== "" && { name: "Room", value: instrument.room },
          { name: "Keys", value: <KeysWords {...instrument} /> },
          { name: "Break", value: <BreakWords breakMidi={instrument.breakMidi} /> },
          { name: "Pitch", value: `A4 = ${instrument.referenceHz} Hz` },
          { name: "Temperament", value: temperamentWords(instrument.temperament) },
        ]}
      />
      <p className="lab mt-3">
        You can change instruments of visits you are on. The office can put you on one.
      </p>
    </div>
  );
}
