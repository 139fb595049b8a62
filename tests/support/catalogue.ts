import type postgres from "postgres";

/** What the database's own catalogue says of its tables: nobody can forget to list one. */
export type CatalogueTable = {
  name: string;
  rowSecurity: boolean;
  hasShopId: boolean;
  /** Commands the app role may run according to its policies. */
  policies: string[];
  grants: string[];
};

export async function publicTables(sql: postgres.Sql): Promise<CatalogueTable[]> {
  return sql<CatalogueTable[]>`
    select c.relname as name, c.relrowsecurity as "rowSecurity",
      exists (select 1 from pg_attribute a where a.attrelid = c.oid and a.attname = 'shop_id' and not a.attisdropped) as "hasShopId",
      array(select p.cmd from pg_policies p where p.schemaname = 'public' and p.tablename = c.relname
        and p.roles @> array['agraffe_app']::name[] order by 1) as policies,
      array(select g.privilege_type::text from information_schema.role_table_grants g
        where g.table_schema = 'public' and g.table_name = c.relname and g.grantee = 'agraffe_app' order by 1) as grants
    from pg_class c where c.relnamespace = 'public'::regnamespace and c.relkind in ('r', 'p', 'v', 'm') order by 1`;
}

/** Tables of no shop, which the app role must not reach at all. */
const noShops = new Set(["request_count"]);

/** Every table that is not walled as it must be, with what is wrong. */
export function unwalled(tables: readonly CatalogueTable[]): string[] {
  return tables.flatMap(({ name, rowSecurity, hasShopId, policies, grants }) => {
    if (noShops.has(name)) return grants.length > 0 ? [`${name}: the app role reaches it`] : [];
    if (!rowSecurity) return [`${name}: no row-level security`];
    if (!hasShopId && name !== "shop") return [`${name}: no shop_id`];
    if (!policies.includes("SELECT") && !policies.includes("ALL")) return [`${name}: no policy to read by`];
    return [];
  });
}
