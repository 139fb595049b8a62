"use client";

import { useQuery } from "@tanstack/react-query";
import { useEffect, useMemo, useRef, useState } from "react";
import type { BandStep } from "@/components/charts/band-progress";
import { builtInStyle, isBuiltInStyle, styleFromRegisters } from "@/lib/acoustics";
import { fetchJson } from "@/lib/client/fetch-json";
import { planKeys } from "@/lib/plans/keys";
import type { AnalysisRecord, StyleList } from "@/lib/plans/schema";
import type { KeyRange } from "@/lib/readings/rules";
import type { NoteRecord } from "@/lib/readings/schema";
import { type BandContext, bandAfter, type NextNote, nextNote, observationsInOrder } from "./band-steps";

const STEPS_BACK = 8;
const STEPS_ON = 4;

export type BandSteps = { read: BandStep[]; chain: NextNote[] };

/** How the band narrowed and what the next notes are worth, computed a step at a time so that typing never waits. */
export function useBandSteps(
  notes: readonly NoteRecord[],
  range: KeyRange,
  analysis: AnalysisRecord | undefined,
): BandSteps | null {
  const context = useBandContext(range, analysis);
  const [steps, setSteps] = useState<BandSteps | null>(null);
  const known = useRef<{ context: BandContext; bands: Map<string, BandStep> } | null>(null);

  useEffect(() => {
    if (!context) return;
    if (known.current?.context !== context) known.current = { context, bands: new Map() };
    const { bands } = known.current;
    const observations = observationsInOrder(notes);
    const read: BandStep[] = [];
    const chain: NextNote[] = [];
    let ahead = observations;
    let timer: ReturnType<typeof setTimeout>;

    const jobs: (() => void)[] = [];
    for (let count = Math.max(1, observations.length - STEPS_BACK); count <= observations.length; count++) {
      const some = observations.slice(0, count);
      const name = some.map(({ midi, b, bSigma }) => `${midi}:${b}:${bSigma}`).join(" ");
      jobs.push(() => {
        const step = bands.get(name) ?? bandAfter(some, context);
        bands.set(name, step);
        read.push(step);
      });
    }
    for (let count = 0; count < STEPS_ON; count++) {
      jobs.push(() => {
        const found = nextNote(ahead, context);
        if (!found) return;
        ahead = found.observations;
        chain.push(found.next);
      });
    }
    const run = (index: number) => {
      const job = jobs[index];
      if (!job) return setSteps({ read, chain });
      job();
      timer = setTimeout(() => run(index + 1), 16);
    };
    timer = setTimeout(() => run(0), 200);
    return () => clearTimeout(timer);
  }, [notes, context]);

  return steps;
}

function useBandContext(range: KeyRange, analysis: AnalysisRecord | undefined): BandContext | null {
  const ref = analysis?.style.ref;
  const ofHouse = ref !== undefined && !isBuiltInStyle(ref);
  const { data: styles } = useQuery({
    queryKey: planKeys.styles,
    queryFn: ({ signal }) => fetchJson<StyleList>("/api/v1/styles", { signal }),
    enabled: ofHouse,
  });
  const temperament = JSON.stringify(analysis?.temperament ?? null);
  const referenceHz = analysis?.referenceHz;
  return useMemo(() => {
    if (ref === undefined || referenceHz === undefined) return null;
    const house = styles?.house.find(({ id }) => id === ref);
    const style = isBuiltInStyle(ref)
      ? builtInStyle(ref, range.firstMidi, range.lastMidi)
      : house && styleFromRegisters(house, range.firstMidi, range.lastMidi);
    if (!style) return null;
    return { range, style, temperament: JSON.parse(temperament), referenceHz };
  }, [ref, styles, range, temperament, referenceHz]);
}
