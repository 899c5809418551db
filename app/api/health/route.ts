import { appPool } from "@/db/client";

/** Whether the server and its database answer; open, and tells nothing else. */
export async function GET(): Promise<Response> {
  try {
    await appPool().query("select 1");
    return Response.json({ ok: true });
  } catch {
    return Response.json({ ok: false }, { status: 503 });
  }
}
