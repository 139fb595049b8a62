"use client";

import { useState } from "react";
import { SharpText } from "@/components/charts/note-name";
import { ActionStrip } from "@/components/shell/action-strip";
import { Button, LinkButton } from "@/components/ui/button";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import { Popover } from "@/components/ui/popover";
import type { ActionResult } from "@/lib/doors/action-result";
import type { Move, VisitState } from "@/lib/visits/rules";
import { MoveDialog, type MovedVisit } from "./move-dialog";
import { moveDone, moveLabel, nextMove } from "./move-words";
import type { GoOn } from "./progress-words";
import { ReasonDialog } from "./reason-dialog";

type Stepped = MovedVisit & { version: number; moves: Move[] };

export type StepAction = (input: unknown) => Promise<ActionResult<Stepped>>;

export type MovesProps = {
  visit: { id: string; version: number; start: string; end: string; moves: readonly Move[] };
  locale: string;
  step: StepAction;
  move: StepAction;
};

/**
 * Where the visit goes next. The next step stands at the head of the page on the desk and under the thumb on
 * the phone; what is rarer stands beside it. Steps are done at once and offered back.
 */
function useVisitMoves({ visit, step }: Pick<MovesProps, "visit" | "step">) {
  const [busy, setBusy] = useState<VisitState | null>(null);
  const [refused, setRefused] = useState<string>();

  async function take(move: Move, reason?: string): Promise<boolean> {
    if (busy) return false;
    setBusy(move.to);
    setRefused(undefined);
    try {
      const result = await step({ id: visit.id, version: visit.version, to: move.to, reason });
      if (!result.ok) {
        setRefused(result.error.fields?.reason ?? result.error.message);
        showMessage({ kind: "attention", text: "Nothing was changed.", detail: result.error.message });
        return false;
      }
      const { version, moves } = result.data;
      const back = moves.find((one) => one.back);
      if (back && !move.back) {
        toastWithUndo(moveDone(move.to), async () => {
          const undone = await step({ id: visit.id, version, to: back.to });
          if (!undone.ok) throw new Error(undone.error.message);
        });
      } else showMessage({ text: moveDone(move.to) });
      return true;
    } catch {
      showMessage({
        kind: "attention",
        text: "The server did not answer.",
        detail: "Nothing was changed. Check the connection and try again.",
      });
      return false;
    } finally {
      setBusy(null);
    }
  }

  return { busy, refused, take };
}

export function VisitMoves({
  visit,
  locale,
  step,
  move: moveAction,
  changeHref,
  goOn,
}: MovesProps & { changeHref: string | undefined; goOn: GoOn | null }) {
  const { busy, refused, take } = useVisitMoves({ visit, step });
  const [asking, setAsking] = useState<VisitState | null>(null);
  const next = nextMove(visit.moves);
  const back = visit.moves.find((move) => move.back);
  const others = visit.moves.filter((move) => move !== next && move !== back);

  function press(move: Move) {
    if (move.asksReason) setAsking(move.to);
    else take(move);
  }

  const taking = { busy: busy !== null && busy === next?.to, onTake: press };
  const lead = goOn || next ? <Lead goOn={goOn} next={next} {...taking} /> : null;
  const second = next ? <MoveButton move={next} {...taking} /> : null;

  return (
    <>
      <div className="flex flex-wrap items-center gap-2" data-no-print>
        {back ? (
          <Button kind="quiet" busy={busy === back.to} onClick={() => press(back)}>
            {moveLabel(back)}
          </Button>
        ) : null}
        {others.length > 0 || changeHref ? (
          <Popover label="Other steps" title="Other steps">
            <ul className="-mx-2">
              {others.map((move) => (
                <li key={move.to}>
                  <Button
                    kind="quiet"
                    className="w-full justify-start!"
                    busy={busy === move.to}
                    onClick={(event) => {
                      event.currentTarget.closest<HTMLElement>("[popover]")?.hidePopover();
                      press(move);
                    }}
                  >
                    {moveLabel(move)}
                  </Button>
                </li>
              ))}
              {changeHref ? (
                <li>
                  <LinkButton kind="quiet" className="w-full justify-start!" href={changeHref}>
                    Change people, work or notes
                  </LinkButton>
                </li>
              ) : null}
            </ul>
          </Popover>
        ) : null}
        <span className="flex gap-2 max-lg:hidden">
          {goOn ? second : null}
          {lead}
        </span>
      </div>
      {lead ? (
        <ActionStrip>
          {goOn ? second : null}
          {lead}
        </ActionStrip>
      ) : null}
      <ReasonDialog
        key={asking}
        to={asking === "moved" ? null : asking}
        busy={busy !== null}
        refused={refused}
        onClose={() => setAsking(null)}
        onGive={async (reason) => {
          const move = visit.moves.find(({ to }) => to === asking);
          if (move && (await take(move, reason))) setAsking(null);
        }}
      />
      <MoveDialog
        open={asking === "moved"}
        visit={visit}
        locale={locale}
        action={moveAction}
        onClose={() => setAsking(null)}
      />
    </>
  );
}

type Taking = { busy: boolean; onTake: (move: Move) => void };

function MoveButton({
  move,
  kind,
  at,
  busy,
  onTake,
}: Taking & { move: Move; kind?: "primary"; at?: string }) {
  return (
    <Button kind={kind} className="min-w-0" busy={busy} onClick={() => onTake(move)}>
      <span className="truncate">
        {moveLabel(move)}
        {at ? `: ${at}` : null}
      </span>
    </Button>
  );
}

/**
 * What really comes next, in the same words at the head of the page, under the thumb and on the day's page: the
 * work, where it is under way and goes on; else the visit's own next step.
 */
function Lead({
  goOn,
  next,
  at,
  ...taking
}: Taking & { goOn: GoOn | null; next: Move | undefined; at?: string }) {
  if (!goOn) return next ? <MoveButton kind="primary" move={next} at={at} {...taking} /> : null;
  return (
    <LinkButton kind="primary" href={goOn.href} className="min-w-0">
      <span className="truncate">
        <SharpText text={goOn.label} />
      </span>
    </LinkButton>
  );
}

/**
 * On the day's page: what comes next on the visit in hand, with the visit's own next step beside work that goes on;
 * the visit itself where no step is this person's. `strip` draws it under the thumb instead of at the head.
 */
export function NextStep({
  visit,
  step,
  siteName,
  goOn,
  strip,
}: Omit<MovesProps, "move" | "locale"> & { siteName: string; goOn: GoOn | null; strip: boolean }) {
  const { busy, take } = useVisitMoves({ visit, step });
  const next = nextMove(visit.moves);
  const href = `/visits/${visit.id}`;
  const taking = { busy: busy !== null, onTake: take };
  if (!strip) {
    return (
      <>
        <LinkButton href={href}>Open visit</LinkButton>
        {goOn && next ? <MoveButton move={next} {...taking} /> : null}
        <Lead goOn={goOn} next={next} {...taking} />
      </>
    );
  }
  return (
    <ActionStrip>
      {goOn || next ? (
        <>
          {next ? <LinkButton href={href}>Open</LinkButton> : null}
          <Lead goOn={goOn} next={next} at={siteName} {...taking} />
        </>
      ) : (
        <LinkButton kind="primary" href={href} className="min-w-0">
          <span className="truncate">Open {siteName}</span>
        </LinkButton>
      )}
    </ActionStrip>
  );
}
