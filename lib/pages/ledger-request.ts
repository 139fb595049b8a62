/**
 * A list's address in the book ("q", "sort=-name", filters) and the question it puts to the API. Both sides
 * use this, so that the page as first rendered and the pages fetched later answer the same question.
 */
type Asked = {
  search: string;
  sort: { id: string; descending: boolean } | null;
  filters: Readonly<Record<string, string>>;
  cursor?: string | null;
};

export function apiQuery({ search, sort, filters, cursor }: Asked): Record<string, string> {
  return {
    ...filters,
    ...(search ? { q: search } : {}),
    ...(sort ? { sort: sort.id, direction: sort.descending ? "desc" : "asc" } : {}),
    ...(cursor ? { cursor } : {}),
  };
}

export type SearchParams = Record<string, string | string[] | undefined>;

/** What the first page is asked, from the address. Whatever is no filter of the list is left to the schema. */
export function addressQuery(params: SearchParams, filterIds: readonly string[]): Record<string, string> {
  const one = (name: string) => {
    const value = params[name];
    return typeof value === "string" ? value.trim() : "";
  };
  const sort = one("sort");
  return apiQuery({
    search: one("q"),
    sort: sort ? { id: sort.replace(/^-/, ""), descending: sort.startsWith("-") } : null,
    filters: Object.fromEntries(filterIds.flatMap((id) => (one(id) ? [[id, one(id)]] : []))),
  });
}
