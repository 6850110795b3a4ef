/** Whether the program can answer: its database, and the tables that every answer needs. */
import { getDatabase } from "#src/db/database.ts";
import { getTables } from "./tables.ts";

export type Health = { status: "ok"; tableVersion: string; database: "ok" } | { status: "unavailable" };

export async function checkHealth(): Promise<Health> {
  try {
    const { client } = await getDatabase();
    await client.execute("SELECT 1");
    return { status: "ok", tableVersion: (await getTables()).version, database: "ok" };
  } catch (error) {
    console.error("Health:", error);
    return { status: "unavailable" };
  }
}
