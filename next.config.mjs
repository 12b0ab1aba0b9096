/** @type {import("next").NextConfig} */
const nextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  typedRoutes: false,
  serverExternalPackages: ["piscina", "@libsql/client", "libsql", "@node-rs/argon2", "nodemailer"],
  // For every answer, also those that never reach proxy.ts (built files, addresses that cannot be decoded).
  headers: async () => [
    {
      source: "/:path*",
      headers: [
        { key: "x-content-type-options", value: "nosniff" },
        { key: "referrer-policy", value: "same-origin" },
        { key: "x-frame-options", value: "DENY" },
      ],
    },
  ],
  experimental: {
    // Bytes travel by the streaming upload route; actions carry forms only.
    serverActions: { bodySizeLimit: "2mb" },
  },
};
export default nextConfig;
