import "server-only";
import { unstable_rethrow } from "next/navigation";
import type { Ctx } from "@/lib/auth/context";
import { staffCtx } from "@/lib/auth/session";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { problemOf } from "./problem";

const MAX_BODY = 4 * 1024 * 1024;

export interface RouteCall<P> {
  request: Request;
  ctx: Ctx;
  params: P;
  url: URL;
  json(): Promise<unknown>;
}

type Handler<P> = (call: RouteCall<P>) => Promise<Response>;

/** A cookie-bearing write must come from our own pages. Requests without an Origin are refused too: browsers send it. */
export function assertOrigin(request: Request): void {
  if (request.method === "GET" || request.method === "HEAD") return;
  const origin = request.headers.get("origin");
  const own = new URL(env().APP_URL);
  const allowed = [own.origin, own.origin.replace("//localhost", "//127.0.0.1")];
  if (!origin || !allowed.includes(origin))
    throw new AppError("forbidden", "This request did not come from this site's own pages.");
}

export async function readJson(request: Request): Promise<unknown> {
  const length = Number(request.headers.get("content-length") ?? 0);
  if (length > MAX_BODY) throw new AppError("invalid", "The request is larger than 4 MB.");
  const text = await request.text();
  if (text.length > MAX_BODY) throw new AppError("invalid", "The request is larger than 4 MB.");
  if (text.trim() === "") return {};
  try {
    return JSON.parse(text);
  } catch {
    throw new AppError("invalid", "The request is not JSON.");
  }
}

/** Wraps a handler for staff: session, origin, call, errors as problem details, log of faults. */
export function route<P = Record<string, never>>(handler: Handler<P>) {
  return async (request: Request, context: { params: Promise<P> }): Promise<Response> => {
    const requestId = request.headers.get("x-request-id") ?? crypto.randomUUID();
    return guarded(request, requestId, async () => {
      const ctx = { ...(await staffCtx()), requestId };
      assertOrigin(request);
      return handler({
        request,
        ctx,
        params: await context.params,
        url: new URL(request.url),
        json: () => readJson(request),
      });
    });
  };
}

/** Runs `work` and answers any error in the one form. */
export async function guarded(request: Request, requestId: string, work: () => Promise<Response>): Promise<Response> {
  try {
    return await work();
  } catch (error) {
    unstable_rethrow(error);
    const problem = problemOf(error, new URL(request.url).pathname, requestId);
    if (problem.status >= 500) logFault(requestId, problem.instance, error);
    return Response.json(problem, { status: problem.status, headers: { "content-type": "application/problem+json" } });
  }
}

/** The text of a fault goes to the log only; the message of a database error can quote a row, so its parameters stay out. */
export function logFault(requestId: string, where: string, error: unknown): void {
  const cause = error instanceof Error && error.cause instanceof Error ? error.cause : error;
  const line =
    cause instanceof Error
      ? `${cause.name}: ${cause.message}\n${cause.stack?.split("\n").slice(1, 5).join("\n")}`
      : String(cause);
  console.error(JSON.stringify({ at: new Date().toISOString(), requestId, where, fault: line }));
}

export const ok = (value: unknown, init: ResponseInit = {}) =>
  Response.json(value ?? null, { ...init, headers: { "cache-control": "no-store", ...init.headers } });
