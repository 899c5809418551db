import { randomBytes } from "node:crypto";
import { type NextRequest, NextResponse } from "next/server";

export const config = {
  runtime: "nodejs",
  matcher: [{ source: "/((?!_next/static|_next/image|fonts/|favicon.svg|mark.svg|logo.svg|theme.js).*)" }],
};

/** Pages that need no sign-in; everything else sends a visitor without a session cookie to the sign-in page. */
const OPEN = [/^\/sign-in/, /^\/sign-up/, /^\/reset/, /^\/invitation\//, /^\/q\//, /^\/i\//, /^\/api\//];

function policy(nonce: string): string {
  const files = process.env.UPLOADTHING_INGEST_URL
    ? ` ${new URL(process.env.UPLOADTHING_INGEST_URL).origin}`
    : " https://*.uploadthing.com https://*.ufs.sh";
  const isDev = process.env.NODE_ENV === "development";
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDev ? " 'unsafe-eval'" : ""}`,
    isDev ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    `img-src 'self' blob: data:${files}`,
    "font-src 'self'",
    `connect-src 'self'${files}`,
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join("; ");
}

/** A convenience, not a lock: it spares visitors a round trip and sets headers; every page and handler asks again. */
export function middleware(request: NextRequest): NextResponse {
  const { pathname } = request.nextUrl;
  const signedIn = request.cookies.getAll().some((cookie) => cookie.name.endsWith("better-auth.session_token"));
  if (!signedIn && !OPEN.some((pattern) => pattern.test(pathname))) {
    const url = new URL("/sign-in", request.nextUrl);
    if (pathname !== "/") url.searchParams.set("to", pathname + request.nextUrl.search);
    return NextResponse.redirect(url);
  }
  const nonce = randomBytes(16).toString("base64");
  const csp = policy(nonce);
  const headers = new Headers(request.headers);
  headers.set("x-nonce", nonce);
  headers.set("x-request-id", crypto.randomUUID());
  headers.set("content-security-policy", csp);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set("content-security-policy", csp);
  response.headers.set("x-content-type-options", "nosniff");
  // not "no-referrer": a form posted from our own page would then come without its origin
  response.headers.set("referrer-policy", "same-origin");
  response.headers.set("permissions-policy", "camera=(self), microphone=(), geolocation=()");
  response.headers.set("cross-origin-opener-policy", "same-origin");
  response.headers.set("x-request-id", headers.get("x-request-id") ?? "");
  return response;
}
