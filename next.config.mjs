/** @type {import('next').NextConfig} */
const config = {
  poweredByHeader: false,
  reactStrictMode: true,
  // Native and stateful packages stay out of the bundle: server.ts alone makes them.
  serverExternalPackages: ["sequelize", "sqlite3", "serialport", "pino", "umzug"],
  devIndicators: false,
  experimental: { authInterrupts: true },
};

export default config;
