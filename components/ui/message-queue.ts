/** What is said to the person at the foot of the page. A store outside React, so that any handler can speak. */
export type MessageKind = "done" | "attention" | "waiting";

export type MessageAction = { label: string; onPress: () => void } | { label: string; href: string };

export type Message = {
  /** What happened, in one sentence. */
  text: string;
  /** What it means or what to do, set after the first sentence. */
  detail?: string;
  kind?: MessageKind;
  action?: MessageAction;
};

export type ShownMessage = Message & { id: number };

/** More than three would cover the page; the oldest has been read by then. */
const most = 3;

let lastId = 0;
let shown: readonly ShownMessage[] = [];
const listeners = new Set<() => void>();

function set(next: readonly ShownMessage[]) {
  shown = next;
  for (const listener of listeners) listener();
}

export function showMessage(message: Message): number {
  lastId += 1;
  set([...shown, { ...message, id: lastId }].slice(-most));
  return lastId;
}

export function dismissMessage(id: number): void {
  if (shown.some((message) => message.id === id)) set(shown.filter((message) => message.id !== id));
}

export function subscribeToMessages(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function shownMessages(): readonly ShownMessage[] {
  return shown;
}

/**
 * Says what was done and offers to take it back. `undo` runs at most once; if it fails the person is told,
 * because by then the page may already show the old state.
 */
export function toastWithUndo(text: string, undo: () => unknown): number {
  let used = false;
  return showMessage({
    text,
    action: {
      label: "Undo",
      onPress: () => {
        if (used) return;
        used = true;
        Promise.resolve()
          .then(undo)
          .catch(() =>
            showMessage({
              kind: "attention",
              text: "That could not be undone.",
              detail: "Load the page again to see how it stands.",
            }),
          );
      },
    },
  });
}
