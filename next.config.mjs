/** @type {import("next").NextConfig} */
const nextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  typedRoutes: false,
  serverExternalPackages: ["piscina", "@libsql/client", "libsql", "@node-rs/argon2", "nodemailer"],
  // What proxy.ts does not pass through; everything else gets its headers there.
  headers: async () =>
    ["/_next/:path*", "/api/uploads/:path*"].map((source) => ({
      source,
      headers: [{ key: "X-Content-Type-Options", value: "nosniff" }],
    })),
  experimental: {
    // Bytes travel by the streaming upload route; actions carry forms only.
    serverActions: { bodySizeLimit: "2mb" },
  },
};
export default nextConfig;
