import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { WorkHead } from "@/components/shell/spread";
import { StyleEditor } from "@/components/styles/style-editor";
import { staffActor } from "@/lib/pages/page-actor";
import { getStyles, previewInstruments } from "@/lib/plans/styles/service";
import { changeStyleAction, createStyleAction } from "../actions";

export const metadata: Metadata = { title: "House style" };

export default async function StylePage({ params }: PageProps<"/shop/styles/[id]">) {
  const actor = await staffActor();
  const [styles, instruments] = await Promise.all([getStyles(actor), previewInstruments(actor)]);
  const { id } = await params;
  const style = styles.house.find((candidate) => candidate.id === id);
  if (!style) notFound();
  return (
    <>
      <WorkHead title={style.name} summary="Plans already kept stay as they were computed." />
      <StyleEditor
        key={style.version}
        style={style}
        saved={{ id, version: style.version }}
        canChange={styles.canChange}
        instruments={instruments}
        create={createStyleAction}
        change={changeStyleAction}
      />
    </>
  );
}
