/**
 * Headers that are the same for every answer. The content security policy carries a nonce,
 * so it is set per request in proxy.ts, frame-ancestors included.
 */
const standingHeaders = [
  { key: "X-Content-Type-Options", value: "nosniff" },
  { key: "Referrer-Policy", value: "same-origin" },
  { key: "Cross-Origin-Opener-Policy", value: "same-origin" },
  { key: "Permissions-Policy", value: "microphone=(self), camera=(self), geolocation=(), payment=()" },
];

/** @type {import("next").NextConfig} */
const nextConfig = {
  distDir: process.env.NEXT_DIST_DIR ?? ".next",
  reactStrictMode: true,
  poweredByHeader: false,
  typedRoutes: true,
  // `npm test` checks the types, tests included; a start should not wait for that, nor fail over a test.
  typescript: { ignoreBuildErrors: true },
  // Nonces and a prerendered shell exclude each other: the page would not hydrate.
  cacheComponents: false,
  devIndicators: false,
  turbopack: { root: import.meta.dirname },
  experimental: {
    agentUpgrade: false,
    authInterrupts: true,
    serverActions: { bodySizeLimit: "1mb" },
  },
  async headers() {
    return [
      { source: "/:path*", headers: standingHeaders },
      {
        // Public files answer with max-age=0 by default; the faces never change under their name.
        source: "/fonts/:file*",
        headers: [{ key: "Cache-Control", value: "public, max-age=31536000, immutable" }],
      },
    ];
  },
};

export default nextConfig;
