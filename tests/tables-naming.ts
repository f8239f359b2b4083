import { sql } from "drizzle-orm";
import { db } from "~/db/client.server";

/** `table.column` of every column of the schema in which a text stands: for what must be gone everywhere. */
export async function tablesNaming(text: string): Promise<string[]> {
  const [columns] = (await db.execute(
    sql`select table_name t, column_name c from information_schema.columns where table_schema = database()
      and data_type in ('varchar', 'char', 'text', 'mediumtext', 'longtext', 'json')`,
  )) as unknown as [{ t: string; c: string }[]];
  const found: string[] = [];
  for (const { t, c } of columns) {
    const [rows] = (await db.execute(
      sql`select 1 from ${sql.identifier(t)} where ${sql.identifier(c)} like ${`%${text}%`} limit 1`,
    )) as unknown as [unknown[]];
    if (rows.length > 0) found.push(`${t}.${c}`);
  }
  return found;
}
