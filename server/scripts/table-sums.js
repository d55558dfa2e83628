/**
 * What a table holds, in a form that two databases can be compared by.
 *
 * @typedef {{ rows: number, sum: string }} TableSum
 */

/** Values are written the same way whatever the server's settings are. */
const samePrinting = [
  "SET TimeZone = 'UTC';",
  "SET DateStyle = 'ISO, YMD';",
  "SET IntervalStyle = 'iso_8601';",
  "SET bytea_output = 'hex';",
  'SET extra_float_digits = 1;',
].join('\n');

const listing = `
  SELECT format('%I.%I', n.nspname, c.relname), c.relname FROM pg_catalog.pg_class c
  JOIN pg_catalog.pg_namespace n ON n.oid = c.relnamespace
  WHERE n.nspname = 'public' AND c.relkind IN ('r', 'p') AND NOT c.relispartition ORDER BY c.relname;`;

/**
 * Counts every table's rows and sums a hash of each; the order of rows makes no difference, and no row is held.
 *
 * @param {import('./psql-session').PsqlSession} session
 * @returns {Promise<Record<string, TableSum>>} By table; partitions count with theirs.
 */
async function tableSums(session) {
  await session.query(samePrinting);
  /** @type {Record<string, TableSum>} */
  const sums = {};
  for (const [table = '', name = ''] of await session.query(listing)) {
    const [[rows, sum] = []] = await session.query(
      `SELECT count(*), coalesce(sum(('x' || left(md5(t::text), 15))::bit(60)::bigint), 0) FROM ${table} AS t;`,
    );
    sums[name] = { rows: Number(rows), sum: String(sum) };
  }
  return sums;
}

/**
 * @param {Record<string, TableSum>} expected
 * @param {Record<string, TableSum>} found
 * @returns {string[]} Names of the tables that differ or that only one side has.
 */
function differingTables(expected, found) {
  return [...new Set([...Object.keys(expected), ...Object.keys(found)])].filter(
    (name) => expected[name]?.rows !== found[name]?.rows || expected[name]?.sum !== found[name]?.sum,
  );
}

module.exports = { differingTables, tableSums };
