import AxeBuilder from "@axe-core/playwright";
import { expect, type Page } from "@playwright/test";

const standard = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];

/** What a change of theme can break; all else is the same in both. */
const ofColour = ["color-contrast", "link-in-text-block"];

/** A frame in which no script may run answers no question; what a mail shows in one is its own affair. */
const withoutScripts = "iframe[sandbox]:not([sandbox~='allow-scripts'])";

/** No violation that can be found by rule, named with the elements it stands at. */
export async function expectAccessible(page: Page, what = page.url(), rules?: readonly string[]) {
  const axe = new AxeBuilder({ page }).exclude(withoutScripts);
  const { violations } = await (rules ? axe.withRules([...rules]) : axe.withTags(standard)).analyze();
  const found = violations.map(({ id, help, nodes }) => ({
    id,
    help,
    at: nodes.map(({ html, failureSummary }) => `${html} ${failureSummary}`),
  }));
  expect(found, what).toEqual([]);
}

/** Colours pass slowly from one theme to the other; half-way they are those of neither. */
async function changeTheme(page: Page, colorScheme: "light" | "dark") {
  await page.emulateMedia({ colorScheme });
  await page.evaluate(async (wanted) => {
    const nextFrame = () => new Promise(requestAnimationFrame);
    while (!matchMedia(`(prefers-color-scheme: ${wanted})`).matches) await nextFrame();
    await nextFrame();
    await nextFrame();
    const passing = document.getAnimations().filter((animation) => animation instanceof CSSTransition);
    await Promise.allSettled(passing.map(({ finished }) => finished));
  }, colorScheme);
}

/** In both themes as the device asks for them. */
export async function expectAccessibleInBothThemes(page: Page, what: string) {
  await changeTheme(page, "light");
  await expectAccessible(page, `${what}, light`);
  await changeTheme(page, "dark");
  await expectAccessible(page, `${what}, dark`, ofColour);
}

/** Everything the page complains about: to the console, as an uncaught error, or as a request that failed. */
export function listenForFaults(page: Page): string[] {
  const faults: string[] = [];
  page.on("console", (message) => {
    if (message.type() === "error" || message.type() === "warning") faults.push(`console: ${message.text()}`);
  });
  page.on("pageerror", (error) => faults.push(`uncaught: ${error.message}`));
  page.on("requestfailed", (request) => {
    // A page that is left gives up what it was still fetching.
    if (request.failure()?.errorText !== "net::ERR_ABORTED")
      faults.push(`failed: ${request.url()} ${request.failure()?.errorText}`);
  });
  page.on("response", (response) => {
    if (response.status() >= 400) faults.push(`${response.status()}: ${response.url()}`);
  });
  return faults;
}

export async function expectNoSidewaysScroll(page: Page, what: string) {
  const beyond = await page.evaluate(() => {
    const { scrollWidth, clientWidth } = document.documentElement;
    return scrollWidth - clientWidth;
  });
  expect(beyond, `pixels that ${what} is too wide`).toBe(0);
}

/**
 * What can be pressed on a phone answers at least 22 pixels to each side of its middle: by its own box, its
 * label's, or the row that opens wherever it is pressed. Links within running words are exempt, as in WCAG 2.5.5.
 */
export async function expectTouchTargets(page: Page, what: string) {
  const small = await page.evaluate(() => {
    const least = 44;
    const reach = least / 2 - 1;
    const pressable = "a[href], button, input:not([type=hidden]), select, textarea, summary, [role=slider]";

    /** Kept for screen readers, or out of the window until it is wanted. */
    const isHidden = (element: Element) => {
      if (!element.checkVisibility({ visibilityProperty: true })) return true;
      if (element.getBoundingClientRect().bottom + window.scrollY <= 0) return true;
      for (let box: Element | null = element; box; box = box.parentElement)
        if (box.clientWidth <= 1 && box.clientHeight <= 1 && getComputedStyle(box).overflow === "hidden")
          return true;
      return false;
    };
    const inWords = (element: Element) =>
      getComputedStyle(element).display === "inline" &&
      [...(element.parentElement?.childNodes ?? [])].some(
        (node) => node.nodeType === Node.TEXT_NODE && (node.textContent ?? "").trim() !== "",
      );
    const partsOf = (element: Element): Element[] => {
      const labels = element instanceof HTMLInputElement ? [...(element.labels ?? [])] : [];
      const around = element.closest(".field-box, label");
      const row = element.matches("[data-row-focus]") ? element.closest("[data-row]") : null;
      return [element, around, row, ...labels].filter((part) => part !== null);
    };
    const answersAround = (element: Element, parts: readonly Element[]) => {
      element.scrollIntoView({ block: "center", inline: "center" });
      const { left, top, width, height } = element.getBoundingClientRect();
      const [x, y] = [left + width / 2, top + height / 2];
      return [
        [x - reach, y],
        [x + reach, y],
        [x, y - reach],
        [x, y + reach],
      ].every(([atX = 0, atY = 0]) => {
        const hit = document.elementFromPoint(atX, atY);
        return parts.some((part) => hit !== null && (part === hit || part.contains(hit)));
      });
    };

    return [...document.querySelectorAll(pressable)].flatMap((element) => {
      if (isHidden(element) || inWords(element)) return [];
      const parts = partsOf(element);
      // A link may be laid over its whole card, a button around itself, by what is drawn after it.
      const { position, width: afterWidth, height: afterHeight } = getComputedStyle(element, "::after");
      const laidOver =
        position === "absolute"
          ? [{ width: Number.parseFloat(afterWidth), height: Number.parseFloat(afterHeight) }]
          : [];
      const boxes = [...parts.map((part) => part.getBoundingClientRect()), ...laidOver];
      const large = boxes.some(({ width, height }) => width >= least - 0.5 && height >= least - 0.5);
      if (large || answersAround(element, parts)) return [];
      const { width, height } = element.getBoundingClientRect();
      return [`${Math.round(width)} × ${Math.round(height)}: ${element.outerHTML.slice(0, 160)}`];
    });
  });
  expect(small, `targets under 44 pixels on ${what}`).toEqual([]);
}
