import "server-only";
import pg from "pg";
import { databaseUrls } from "@/db/urls";

export interface Change {
  shop: string;
  case: string | null;
  entity: string;
}

type Listener = (change: Change) => void;

const kept = globalThis as unknown as {
  firedeckChanges?: { listeners: Set<Listener>; client: pg.Client | null; starting: Promise<void> | null };
};

function hub() {
  kept.firedeckChanges ??= { listeners: new Set(), client: null, starting: null };
  return kept.firedeckChanges;
}

/** One LISTEN connection a process, shared by every open page; it is made anew when it breaks. */
async function listen(): Promise<void> {
  const shared = hub();
  if (shared.client || shared.starting) return shared.starting ?? undefined;
  shared.starting = (async () => {
    const client = new pg.Client({ connectionString: databaseUrls().app });
    const drop = () => {
      if (shared.client === client) shared.client = null;
      if (shared.listeners.size > 0) setTimeout(() => void listen().catch(() => undefined), 1000).unref();
    };
    client.on("error", drop);
    client.on("end", drop);
    client.on("notification", ({ payload }) => {
      if (!payload) return;
      const change = JSON.parse(payload) as Change;
      for (const listener of shared.listeners) listener(change);
    });
    await client.connect();
    await client.query("listen firedeck_changes");
    shared.client = client;
  })().finally(() => {
    shared.starting = null;
  });
  return shared.starting;
}

export async function onChange(listener: Listener): Promise<() => void> {
  hub().listeners.add(listener);
  await listen();
  return () => {
    hub().listeners.delete(listener);
  };
}
