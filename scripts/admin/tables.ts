import { createReadStream, createWriteStream } from "node:fs";
import { createInterface } from "node:readline";
import { Transform } from "node:stream";
import { pipeline } from "node:stream/promises";
import type { Connection as CallbackConnection } from "mysql2";
import mysql, { type Connection, type RowDataPacket } from "mysql2/promise";

/** A value as text, bytes in base64, or null: exactly what the database holds, whatever the type. */
type Value = string | { base64: string } | null;

export interface TableShape {
  name: string;
  columns: { name: string; binary: boolean }[];
}

const BATCH_BYTES = 4 * 1024 * 1024;

export function connect(databaseUrl: string): Promise<Connection> {
  return mysql.createConnection({ uri: databaseUrl, charset: "utf8mb4", timezone: "Z" });
}

/** The tables of the database and their columns, without those that are computed. */
export async function tablesOf(connection: Connection): Promise<TableShape[]> {
  const [rows] = await connection.query<RowDataPacket[]>(
    `select t.table_name as tableName, c.column_name as name, c.data_type as type
     from information_schema.tables t
     join information_schema.columns c on c.table_schema = t.table_schema and c.table_name = t.table_name
     where t.table_schema = database() and t.table_type = 'BASE TABLE' and c.extra not like '%GENERATED%'
     order by t.table_name, c.ordinal_position`,
  );
  const tables = new Map<string, TableShape>();
  for (const { tableName, name, type } of rows) {
    const table: TableShape = tables.get(tableName) ?? { name: tableName, columns: [] };
    table.columns.push({ name, binary: /blob|binary/.test(type) });
    tables.set(tableName, table);
  }
  return [...tables.values()];
}

/** Writes a table, one row a line, without holding it in memory. Returns the number of rows. */
export async function writeTable(connection: Connection, table: TableShape, file: string): Promise<number> {
  let rows = 0;
  const toLine = new Transform({
    writableObjectMode: true,
    transform(row: (string | Buffer | null)[], _encoding, done) {
      rows += 1;
      const values = row.map(
        (value): Value => (Buffer.isBuffer(value) ? { base64: value.toString("base64") } : value),
      );
      done(null, `${JSON.stringify(values)}\n`);
    },
  });
  const query = (connection as unknown as { connection: CallbackConnection }).connection.query({
    sql: `select ${table.columns.map(({ name }) => `\`${name}\``).join(", ")} from \`${table.name}\``,
    rowsAsArray: true,
    typeCast: (field) =>
      table.columns.find(({ name }) => name === field.name)?.binary ? field.buffer() : field.string(),
  });
  await pipeline(query.stream(), toLine, createWriteStream(file));
  return rows;
}

/** Puts the rows of a file into a table, in batches that fit a packet. */
export async function loadTable(
  connection: Connection,
  name: string,
  columns: string[],
  file: string,
): Promise<void> {
  const into = `insert into \`${name}\` (${columns.map((column) => `\`${column}\``).join(", ")}) values ?`;
  let batch: (string | Buffer | null)[][] = [];
  let bytes = 0;
  const flush = async () => {
    if (batch.length > 0) await connection.query(into, [batch]);
    batch = [];
    bytes = 0;
  };
  for await (const line of createInterface({
    input: createReadStream(file),
    crlfDelay: Number.POSITIVE_INFINITY,
  })) {
    const values: Value[] = JSON.parse(line);
    batch.push(
      values.map((value) =>
        value !== null && typeof value === "object" ? Buffer.from(value.base64, "base64") : value,
      ),
    );
    bytes += line.length;
    if (bytes > BATCH_BYTES) await flush();
  }
  await flush();
}
