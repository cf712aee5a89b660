/** @type {import("next").NextConfig} */
const nextConfig = {
  poweredByHeader: false,
  reactStrictMode: true,
  // Types are checked by `npm run types` and `npm test`; a start does not wait for them a second time.
  typescript: { ignoreBuildErrors: true },
  experimental: { authInterrupts: true },
  serverExternalPackages: ["knex", "pg", "pg-boss", "@node-rs/argon2", "sharp", "pino", "smtp-server", "nodemailer"],
};

export default nextConfig;
