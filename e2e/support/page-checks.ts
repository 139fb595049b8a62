import AxeBuilder from "@axe-core/playwright";
import { expect, type Page } from "@playwright/test";

const standard = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];

/** No violation that can be found by rule, named with the elements it stands at. */
export async function expectAccessible(page: Page, what = page.url()) {
  const { violations } = await new AxeBuilder({ page }).withTags(standard).analyze();
  const found = violations.map(({ id, help, nodes }) => ({
    id,
    help,
    at: nodes.map(({ html, failureSummary }) => `${html} ${failureSummary}`),
  }));
  expect(found, what).toEqual([]);
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
 * What can be pressed on a phone is at least 44 pixels in both directions, its label counted. Links within
 * running words are exempt, as in WCAG 2.5.5; a field drawn smaller than the label around it is as large as that.
 */
export async function expectTouchTargets(page: Page, what: string) {
  const small = await page.evaluate(() => {
    const least = 43.5;
    const pressable = "a[href], button, input:not([type=hidden]), select, textarea, summary, [role=slider]";
    const isShown = (element: Element) =>
      element.checkVisibility({ opacityProperty: true, visibilityProperty: true });
    const inWords = (element: Element) =>
      getComputedStyle(element).display === "inline" &&
      [...(element.parentElement?.childNodes ?? [])].some(
        (node) => node.nodeType === Node.TEXT_NODE && (node.textContent ?? "").trim() !== "",
      );
    return [...document.querySelectorAll(pressable)].flatMap((element) => {
      if (!isShown(element) || element.closest(".sr-only") || inWords(element)) return [];
      const labels =
        "labels" in element ? [...((element.labels as NodeListOf<HTMLElement> | null) ?? [])] : [];
      const boxes = [element, ...labels, element.closest(".field-box, label")]
        .filter((one): one is Element => one !== null)
        .map((one) => one.getBoundingClientRect());
      const box = element.getBoundingClientRect();
      // Drawn outside the window until it is wanted: the link that skips to the page.
      if (box.bottom <= 0) return [];
      const high = Math.max(...boxes.map(({ height }) => height));
      const wide = Math.max(...boxes.map(({ width }) => width));
      if (high >= least && wide >= least) return [];
      return [`${Math.round(wide)} × ${Math.round(high)}: ${element.outerHTML.slice(0, 160)}`];
    });
  });
  expect(small, `targets under 44 pixels on ${what}`).toEqual([]);
}
