import type { RouteMap } from "@/lib/doors/openapi";
import * as nothing from "./[[...nothing]]/route";
import * as customer from "./customers/[id]/route";
import * as customers from "./customers/route";
import * as due from "./due/route";
import * as instrumentAdvice from "./instruments/[id]/advice/route";
import * as instrumentCompare from "./instruments/[id]/compare/route";
import * as instrumentHoldings from "./instruments/[id]/holdings/route";
import * as instrumentPlace from "./instruments/[id]/place/route";
import * as instrument from "./instruments/[id]/route";
import * as instrumentServicePlan from "./instruments/[id]/service-plan/route";
import * as instrumentSheets from "./instruments/[id]/sheets/route";
import * as instrumentString from "./instruments/[id]/strings/[midi]/route";
import * as instrumentStrings from "./instruments/[id]/strings/route";
import * as instruments from "./instruments/route";
import * as me from "./me/route";
import * as members from "./members/route";
import * as planExport from "./plans/[id]/export/route";
import * as plan from "./plans/[id]/route";
import * as search from "./search/route";
import * as sheetAnalysis from "./sheets/[id]/analysis/route";
import * as sheetExport from "./sheets/[id]/export/route";
import * as sheetNote from "./sheets/[id]/notes/[midi]/route";
import * as sheetNotes from "./sheets/[id]/notes/route";
import * as sheetPlans from "./sheets/[id]/plans/route";
import * as sheet from "./sheets/[id]/route";
import * as siteEvent from "./sites/[id]/events/[eventId]/route";
import * as siteEvents from "./sites/[id]/events/route";
import * as site from "./sites/[id]/route";
import * as sites from "./sites/route";
import * as style from "./styles/[id]/route";
import * as styles from "./styles/route";
import * as visit from "./visits/[id]/route";
import * as visitTransitions from "./visits/[id]/transitions/route";
import * as visits from "./visits/route";

/** Every route of the API, for its description. The architecture test holds this against the folder. */
export const routes: RouteMap = {
  "/[[...nothing]]": nothing,
  "/customers": customers,
  "/customers/{id}": customer,
  "/due": due,
  "/instruments": instruments,
  "/instruments/{id}": instrument,
  "/instruments/{id}/advice": instrumentAdvice,
  "/instruments/{id}/compare": instrumentCompare,
  "/instruments/{id}/holdings": instrumentHoldings,
  "/instruments/{id}/place": instrumentPlace,
  "/instruments/{id}/service-plan": instrumentServicePlan,
  "/instruments/{id}/sheets": instrumentSheets,
  "/instruments/{id}/strings": instrumentStrings,
  "/instruments/{id}/strings/{midi}": instrumentString,
  "/me": me,
  "/members": members,
  "/plans/{id}": plan,
  "/plans/{id}/export": planExport,
  "/search": search,
  "/sheets/{id}": sheet,
  "/sheets/{id}/analysis": sheetAnalysis,
  "/sheets/{id}/export": sheetExport,
  "/sheets/{id}/notes": sheetNotes,
  "/sheets/{id}/notes/{midi}": sheetNote,
  "/sheets/{id}/plans": sheetPlans,
  "/sites": sites,
  "/sites/{id}": site,
  "/sites/{id}/events": siteEvents,
  "/sites/{id}/events/{eventId}": siteEvent,
  "/styles": styles,
  "/styles/{id}": style,
  "/visits": visits,
  "/visits/{id}": visit,
  "/visits/{id}/transitions": visitTransitions,
};
