/** @type {import("next").NextConfig} */
const nextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  typedRoutes: false,
  serverExternalPackages: ["piscina", "@libsql/client", "libsql", "@node-rs/argon2", "nodemailer"],
  experimental: {
    // Bytes travel by the streaming upload route; actions carry forms only.
    serverActions: { bodySizeLimit: "2mb" },
  },
};
export default nextConfig;
