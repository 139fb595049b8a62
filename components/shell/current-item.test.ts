import { describe, expect, it } from "vitest";
import { currentHref } from "./current-item";

const items = [
  { href: "/instruments", label: "Instruments" },
  { href: "/instruments/7/plan", label: "Stretch plan" },
  { href: "/instruments/7?from=due", label: "Inharmonicity", exact: true },
  { href: "/shop", label: "Shop" },
  { href: "/customers", label: "Customers", also: ["/sites"] },
];

describe("the place the stud marks", () => {
  it.each([
    ["/instruments", "/instruments"],
    ["/instruments/9", "/instruments"],
    ["/instruments/7", "/instruments/7?from=due"],
    ["/instruments/7/plan/edit", "/instruments/7/plan"],
    ["/sites", "/customers"],
    ["/sites/9/edit", "/customers"],
    ["/shopping", undefined],
    ["/", undefined],
  ])("%s is %s", (pathname, href) => {
    expect(currentHref(items, pathname)).toBe(href);
  });
});
