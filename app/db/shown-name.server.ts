import { type SQL, sql } from "drizzle-orm";
import type { MySqlColumn } from "drizzle-orm/mysql-core";

/** Persons of a bundle have an account that nobody can sign in to: its user name begins so, and its name says where it is from. */
export const FROM_BUNDLE = "from-bundle-";

interface PersonColumns {
  name: MySqlColumn;
  userName: MySqlColumn;
  closedAt: MySqlColumn;
}

/** Whether the account was closed by whoever had it. Null where there is nobody. */
export function isFormer({ closedAt, userName }: PersonColumns): SQL<boolean> {
  return sql`(${closedAt} is not null and ${userName} not like ${`${FROM_BUNDLE}%`})`.mapWith(Boolean);
}

/** The name that pages show; null for a former member and for nobody. */
export function shownName(person: PersonColumns): SQL<string | null> {
  return sql<string | null>`if(${isFormer(person)}, null, ${person.name})`;
}
