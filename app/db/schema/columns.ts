import { bigint, char, customType, datetime, varchar } from "drizzle-orm/mysql-core";

/** Internal row id: never shown, gaps allowed. */
export const rowId = () => bigint("id", { mode: "number", unsigned: true }).autoincrement().primaryKey();

export const rowRef = (name: string) => bigint(name, { mode: "number", unsigned: true });

/** Short random public id, the only id that appears in an address. */
export const publicId = () => varchar("public_id", { length: 16 }).notNull().unique();

/** UTC, microseconds. Written by the application, so that it does not depend on the server's zone. */
export const utc = (name: string) => datetime(name, { mode: "date", fsp: 6 });

export const sha256 = (name: string) => char(name, { length: 64 });

export const longBlob = customType<{ data: Buffer; driverData: Buffer }>({
  dataType: () => "longblob",
});
