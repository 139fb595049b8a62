import { type NextRequest, NextResponse } from "next/server";

/**
 * Sets the nonce with its content security policy and the request id; sends the obviously signed-out to the
 * sign-in page. Access itself is checked in the services and the database, never here.
 */
const open = [
  "/sign-in",
  "/sign-up",
  "/confirm-address",
  "/second-step",
  "/forgot-password",
  "/reset-password",
  "/invitation",
  "/mailbox",
  "/problems",
];

/**
 * A page is only ever written to by a server action. The framework refuses one from a foreign origin as well,
 * but as a fault of the server; by the same rule it is refused here in words. Routes have their own check.
 */
function isForeignWrite(request: NextRequest): boolean {
  if (request.method === "GET" || request.method === "HEAD") return false;
  if (request.nextUrl.pathname.startsWith("/api/")) return false;
  const origin = request.headers.get("origin");
  if (origin === null) return request.headers.get("sec-fetch-site") === "cross-site";
  const host = request.headers.get("x-forwarded-host") ?? request.headers.get("host");
  return !URL.canParse(origin) || new URL(origin).host !== host;
}

function refuseForeignWrite(requestId: string): NextResponse {
  const problem = {
    type: "/problems/forbidden",
    title: "Not allowed",
    status: 403,
    detail: "This came from another site and was refused.",
    code: "forbidden",
    requestId,
  };
  return NextResponse.json(problem, {
    status: 403,
    headers: { "content-type": "application/problem+json", "cache-control": "no-store" },
  });
}

export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString("base64");
  const requestId = crypto.randomUUID();
  if (isForeignWrite(request)) return refuseForeignWrite(requestId);
  const development = process.env.NODE_ENV === "development";
  const policy = [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    // Plots and layout set style attributes; no style element or sheet from elsewhere is allowed.
    `style-src 'self' 'nonce-${nonce}'`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "font-src 'self'",
    `connect-src 'self'${development ? " ws:" : ""}`,
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join("; ");

  const { pathname, search } = request.nextUrl;
  const signedIn = /(?:^|; )(?:__Secure-)?agraffe\.session_token=/.test(request.headers.get("cookie") ?? "");
  const needsSignIn =
    !signedIn && !pathname.startsWith("/api/") && !open.some((path) => pathname.startsWith(path));
  if (needsSignIn) {
    const target = new URL("/sign-in", request.url);
    if (pathname !== "/") target.searchParams.set("next", pathname + search);
    return NextResponse.redirect(target);
  }

  const headers = new Headers(request.headers);
  headers.set("x-nonce", nonce);
  headers.set("x-request-id", requestId);
  headers.set("x-pathname", pathname);
  headers.set("content-security-policy", policy);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set("content-security-policy", policy);
  response.headers.set("x-request-id", requestId);
  return response;
}

export const config = {
  matcher: [
    {
      source: "/((?!_next/static|_next/image|fonts/|icon.svg|mark).*)",
      missing: [{ type: "header", key: "next-router-prefetch" }],
    },
  ],
};
