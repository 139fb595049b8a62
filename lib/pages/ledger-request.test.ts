import { expect, it } from "vitest";
import { addressQuery, apiQuery } from "./ledger-request";

it("asks the server for the first page what the client asks for the next ones", () => {
  const fromAddress = addressQuery({ q: " rope walk ", sort: "-name", archived: "only", tab: "x" }, [
    "archived",
  ]);
  const fromLedger = apiQuery({
    search: "rope walk",
    sort: { id: "name", descending: true },
    filters: { archived: "only" },
  });
  expect(fromAddress).toEqual(fromLedger);
  expect(fromAddress).toEqual({ q: "rope walk", sort: "name", direction: "desc", archived: "only" });
});

it("leaves out what is empty or given twice", () => {
  expect(addressQuery({ q: ["a", "b"], sort: "", archived: "" }, ["archived"])).toEqual({});
});
