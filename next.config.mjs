/** @type {import("next").NextConfig} */
const nextConfig = {
  poweredByHeader: false,
  reactStrictMode: true,
  experimental: { authInterrupts: true },
  serverExternalPackages: ["knex", "pg", "pg-boss", "@node-rs/argon2", "sharp", "pino", "smtp-server", "nodemailer"],
};

export default nextConfig;
