import type { Metadata } from "next";
import { WorkHead } from "@/components/shell/spread";
import { StyleEditor } from "@/components/styles/style-editor";
import { registerStyles } from "@/lib/acoustics";
import { staffActor } from "@/lib/pages/page-actor";
import { builtInWords } from "@/lib/plans/rules";
import { getStyles, previewInstruments } from "@/lib/plans/styles/service";
import { changeStyleAction, createStyleAction } from "../actions";

export const metadata: Metadata = { title: "New style" };

export default async function NewStylePage({ searchParams }: PageProps<"/shop/styles/new">) {
  const actor = await staffActor();
  const [{ canChange }, instruments] = await Promise.all([getStyles(actor), previewInstruments(actor)]);
  const { from } = await searchParams;
  const begin = from === "close" || from === "wide" ? from : "even";
  return (
    <>
      <WorkHead title="New style" summary="The curve answers at once; nothing is kept until you save." />
      <StyleEditor
        style={{ ...registerStyles[begin], name: "" }}
        beginsWith={`${builtInWords[begin].title}, built in`}
        instruments={instruments}
        saved={null}
        canChange={canChange}
        create={createStyleAction}
        change={changeStyleAction}
      />
    </>
  );
}
