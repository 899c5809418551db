export interface AuthAnswer<T> {
  ok: boolean;
  data: T | null;
  message: string;
  pointer?: string;
}

/** Posts to the sign-in API; a network failure is an answer too, so that a form keeps what was typed. */
export async function postAuth<T = unknown>(path: string, body: Record<string, unknown>): Promise<AuthAnswer<T>> {
  try {
    const response = await fetch(path, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify(body),
    });
    const data = (await response.json().catch(() => null)) as
      | (T & { message?: string; detail?: string; errors?: { pointer: string }[] })
      | null;
    const message =
      response.status === 429
        ? "Too many tries. Wait ten seconds, then try again."
        : (data?.detail ?? data?.message ?? "");
    return { ok: response.ok, data, message, pointer: data?.errors?.[0]?.pointer };
  } catch {
    return { ok: false, data: null, message: "No connection. What you typed is still here; try again." };
  }
}
