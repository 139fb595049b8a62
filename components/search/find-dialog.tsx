"use client";

import { useEffect, useState } from "react";
import { isPagesKey, letterKeysOn } from "@/components/shell/letter-keys";
import { Dialog } from "@/components/ui/dialog";
import { Finder } from "./finder";

/**
 * Find over whatever page is open: the slash key and every link to the finding page open it in place.
 * Without a script, or in a new tab, those links lead to the page of the same name.
 */
export function FindDialog({ href }: { href: string }) {
  const [open, setOpen] = useState(false);

  useEffect(() => {
    function onKey(event: KeyboardEvent) {
      if (event.key !== "/" || !letterKeysOn() || !isPagesKey(event)) return;
      event.preventDefault();
      setOpen(true);
    }
    function onPress(event: MouseEvent) {
      if (event.button !== 0 || event.ctrlKey || event.metaKey || event.shiftKey || event.altKey) return;
      if (!(event.target instanceof Element) || window.location.pathname === href) return;
      const link = event.target.closest("a");
      if (link?.getAttribute("href") !== href) return;
      event.preventDefault();
      setOpen(true);
    }
    // In the capture phase, before the link itself acts.
    document.addEventListener("keydown", onKey, true);
    document.addEventListener("click", onPress, true);
    return () => {
      document.removeEventListener("keydown", onKey, true);
      document.removeEventListener("click", onPress, true);
    };
  }, [href]);

  return (
    <Dialog
      open={open}
      onClose={() => setOpen(false)}
      title="Find"
      className="mt-[8dvh]! max-h-[84dvh] w-[min(640px,calc(100vw-32px))]! lg:mt-[12dvh]!"
    >
      <div className="mt-3 flex max-h-[60dvh] flex-col">
        <Finder onOpen={() => setOpen(false)} />
      </div>
    </Dialog>
  );
}
