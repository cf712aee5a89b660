/** @type {import("next").NextConfig} */
const nextConfig = {
  poweredByHeader: false,
  reactStrictMode: true,
  // Types are checked by `npm run types` and `npm test`; a start does not wait for them a second time.
  typescript: { ignoreBuildErrors: true },
  // Bodies beyond what proxy.ts passes on are cut off without a word: above the largest that a route takes (64 MB).
  experimental: { authInterrupts: true, proxyClientMaxBodySize: "66mb" },
  serverExternalPackages: [
    "knex",
    "pg",
    "pg-boss",
    "@node-rs/argon2",
    "sharp",
    "fontkit",
    "pino",
    "smtp-server",
    "nodemailer",
  ],
};

export default nextConfig;
