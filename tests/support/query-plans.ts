import type postgres from "postgres";
import { appDb } from "@/db/client";

/** A node of a plan as EXPLAIN (ANALYZE, BUFFERS, FORMAT JSON) words it. */
export type PlanNode = {
  "Node Type": string;
  "Relation Name"?: string;
  "Index Name"?: string;
  "Index Cond"?: string;
  "Recheck Cond"?: string;
  "Function Name"?: string;
  "Actual Rows": number;
  "Actual Loops": number;
  "Rows Removed by Filter"?: number;
  "Shared Hit Blocks": number;
  "Shared Read Blocks": number;
  Plans?: PlanNode[];
};

export type Statement = { text: string; root: PlanNode; nodes: PlanNode[]; buffers: number };

/** What one transaction read of a table, counted by the server: definer functions are in it too. */
export type TableUse = { table: string; sequentialScans: number; rowsByIndex: number };

export type Reading<T> = { value: T; statements: Statement[]; tables: TableUse[]; buffers: number };

type Begin = (work: (transaction: postgres.TransactionSql) => Promise<unknown>) => Promise<unknown>;
type Recorded = { text: string; parameters: never[] };

/**
 * Runs a service and, in the very transaction it opened, with its settings and its parameters, has every
 * statement it sent explained. (auto_explain would need a superuser, which the tables' owner is not.)
 */
export async function readPlans<T>(run: () => Promise<T>): Promise<Reading<T>> {
  const client = appDb().$client as { begin: Begin };
  const { begin } = client;
  const statements: Statement[] = [];
  const tables = new Map<string, TableUse>();
  client.begin = (work) =>
    begin.call(client, async (transaction) => {
      const recorded: Recorded[] = [];
      const spy = new Proxy(transaction, {
        get(target, property, receiver) {
          if (property !== "unsafe") return Reflect.get(target, property, receiver);
          return (text: string, parameters: never[], options?: postgres.UnsafeQueryOptions) => {
            recorded.push({ text, parameters });
            return target.unsafe(text, parameters, options);
          };
        },
      });
      const before = await tableUse(transaction);
      const value = await work(spy);
      for (const [table, use] of await tableUse(transaction)) {
        const earlier = before.get(table);
        const sum = tables.get(table);
        tables.set(table, {
          table,
          sequentialScans:
            use.sequentialScans - (earlier?.sequentialScans ?? 0) + (sum?.sequentialScans ?? 0),
          rowsByIndex: use.rowsByIndex - (earlier?.rowsByIndex ?? 0) + (sum?.rowsByIndex ?? 0),
        });
      }
      for (const statement of recorded) statements.push(await explain(transaction, statement));
      await transaction`select pg_stat_force_next_flush()`;
      return value;
    });
  try {
    const value = await run();
    const buffers = statements.reduce((sum, statement) => sum + statement.buffers, 0);
    return { value, statements, tables: [...tables.values()], buffers };
  } finally {
    client.begin = begin;
  }
}

async function explain(
  transaction: postgres.TransactionSql,
  { text, parameters }: Recorded,
): Promise<Statement> {
  const [row] = await transaction.unsafe<{ "QUERY PLAN": { Plan: PlanNode }[] }[]>(
    `explain (analyze, buffers, format json) ${text}`,
    parameters,
  );
  const root = row?.["QUERY PLAN"][0]?.Plan;
  if (!root) throw new Error(`No plan for ${text}`);
  return { text, root, nodes: flat(root), buffers: root["Shared Hit Blocks"] + root["Shared Read Blocks"] };
}

function flat(node: PlanNode): PlanNode[] {
  return [node, ...(node.Plans ?? []).flatMap(flat)];
}

/** Counts not yet handed over of earlier transactions are in these figures, so only differences mean something. */
async function tableUse(transaction: postgres.TransactionSql): Promise<Map<string, TableUse>> {
  const rows = await transaction<TableUse[]>`
    select relname as table, seq_scan::int as "sequentialScans", coalesce(idx_tup_fetch, 0)::int as "rowsByIndex"
      from pg_stat_xact_user_tables where seq_scan > 0 or idx_scan > 0`;
  return new Map(rows.map((row) => [row.table, row]));
}

export type TableSize = { table: string; rows: number; ofShop: number };

const largeTable = 10_000;

/** A search goes over a table this often at most: among its own, its neighbours' and the records they lead to. */
const passes = 5;

/** What a reading did that no reading of a shop may: walk a large table, or look past the shop's own rows. */
export function faultsOf(reading: Reading<unknown>, sizes: readonly TableSize[]): string[] {
  const faults: string[] = [];
  for (const { table, rows, ofShop } of sizes) {
    const use = reading.tables.find((entry) => entry.table === table);
    if (rows > largeTable && use && use.sequentialScans > 0) faults.push(`${table} is read from end to end`);
    if (use && use.rowsByIndex > passes * ofShop) {
      faults.push(`${use.rowsByIndex} rows of ${table} are read where the shop has ${ofShop}`);
    }
  }
  for (const node of reading.statements.flatMap(({ nodes }) => nodes)) {
    const size = sizes.find(({ table }) => table === node["Relation Name"]);
    const read = node["Actual Rows"] + (node["Rows Removed by Filter"] ?? 0);
    if (size && size.rows > largeTable && node["Node Type"] === "Seq Scan")
      faults.push(`a plan walks ${size.table} from end to end`);
    if (size && size.rows > largeTable && read > size.ofShop)
      faults.push(`a plan reads ${read} rows of ${size.table} where the shop has ${size.ofShop}`);
    if (node["Index Name"] && !node["Index Cond"]?.includes("shop_id"))
      faults.push(`a plan enters ${node["Index Name"]} without the shop`);
  }
  return faults;
}

/** How often each index was entered so far, definer functions included. */
export async function indexUse(owner: postgres.Sql): Promise<Map<string, number>> {
  const rows = await owner<{ index: string; scans: number }[]>`
    select indexrelname as index, idx_scan::int as scans from pg_stat_user_indexes`;
  return new Map(rows.map(({ index, scans }) => [index, scans]));
}

/** Every table of the shops, with its rows in all and those of one shop. */
export async function tableSizes(owner: postgres.Sql, shopId: string): Promise<TableSize[]> {
  const tables = await owner<{ name: string }[]>`
    select table_name as name from information_schema.columns where table_schema = 'public' and column_name = 'shop_id'`;
  const sizes: TableSize[] = [];
  for (const { name } of tables) {
    const [row] = await owner<{ rows: number; ofShop: number }[]>`
      select count(*)::int as rows, (count(*) filter (where shop_id = ${shopId}))::int as "ofShop" from ${owner(name)}`;
    if (row) sizes.push({ table: name, ...row });
  }
  return sizes;
}
