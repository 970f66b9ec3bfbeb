import type { NextConfig } from "next";

const config: NextConfig = {
  turbopack: { root: import.meta.dirname },
  serverExternalPackages: ["mysql2", "nodemailer", "exceljs", "pino"],
  poweredByHeader: false,
  agentRules: false,
  typedRoutes: true,
  allowedDevOrigins: ["127.0.0.1", "localhost"],
};

export default config;
