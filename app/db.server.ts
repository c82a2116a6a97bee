import SqliteDatabase from "better-sqlite3";
import { drizzle } from "drizzle-orm/better-sqlite3";
import { migrate } from "drizzle-orm/better-sqlite3/migrator";
import type { BaseSQLiteDatabase } from "drizzle-orm/sqlite-core";
import * as schema from "#drizzle/schema/index";
import { env } from "./env.server";

/** The database or a transaction on it: rooms take either. */
export type Database = BaseSQLiteDatabase<"sync", SqliteDatabase.RunResult, typeof schema>;

export type OpenDatabase = { db: Database; client: SqliteDatabase.Database; close: () => void };

/** Opens a database file (or ":memory:"), brings it to the newest migration and returns it. */
export function openDatabase(file: string, migrations = "drizzle/migrations"): OpenDatabase {
  const client = new SqliteDatabase(file);
  client.pragma("journal_mode = WAL");
  client.pragma("synchronous = NORMAL");
  client.pragma("busy_timeout = 5000");
  client.pragma("cache_size = -32000");
  client.pragma("temp_store = MEMORY");
  const db = drizzle({ client, schema, casing: "snake_case" });
  client.pragma("foreign_keys = OFF"); // a later migration may rebuild a table
  migrate(db, { migrationsFolder: migrations });
  client.pragma("foreign_keys = ON");
  return {
    db,
    client,
    close: () => {
      client.pragma("optimize");
      client.close();
    },
  };
}

const held = globalThis as { castlenutDatabase?: OpenDatabase };

/** The one connection of this process; rooms never call this, they receive the database. */
export function database(): OpenDatabase {
  held.castlenutDatabase ??= openDatabase(env().DATABASE_FILE);
  return held.castlenutDatabase;
}

/** Runs `work` in one transaction: all of it happens or none. */
export function inTransaction<S extends { db: Database }, T>(scope: S, work: (scope: S) => T): T {
  return scope.db.transaction((tx) => work({ ...scope, db: tx }), { behavior: "immediate" });
}
