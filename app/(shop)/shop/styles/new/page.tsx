import type { Metadata } from "next";
import { WorkHead } from "@/components/shell/spread";
import { StyleEditor } from "@/components/styles/style-editor";
import { registerStyles } from "@/lib/acoustics";
import { staffActor } from "@/lib/pages/page-actor";
import { getStyles } from "@/lib/plans/styles/service";
import { changeStyleAction, createStyleAction } from "../actions";

export const metadata: Metadata = { title: "New style" };

export default async function NewStylePage({ searchParams }: PageProps<"/shop/styles/new">) {
  const { canChange } = await getStyles(await staffActor());
  const { from } = await searchParams;
  const begin = from === "close" || from === "wide" ? registerStyles[from] : registerStyles.even;
  return (
    <>
      <WorkHead title="New style" summary="The curve answers at once; nothing is kept until you save." />
      <StyleEditor
        style={{ ...begin, name: "" }}
        saved={null}
        canChange={canChange}
        create={createStyleAction}
        change={changeStyleAction}
      />
    </>
  );
}
