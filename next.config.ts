import type { NextConfig } from "next";

const config: NextConfig = {
  turbopack: { root: import.meta.dirname },
  serverExternalPackages: ["mysql2", "nodemailer", "exceljs", "pino"],
  poweredByHeader: false,
  agentRules: false,
  typedRoutes: true,
  // Tests are type-checked by `npm run types`; a slip in one must not stop the product from starting.
  typescript: { tsconfigPath: "tsconfig.build.json" },
  headers: () =>
    Promise.resolve([
      {
        source: "/:path*",
        headers: [
          { key: "X-Content-Type-Options", value: "nosniff" },
          { key: "X-Frame-Options", value: "DENY" },
          { key: "Referrer-Policy", value: "strict-origin-when-cross-origin" },
          {
            key: "Permissions-Policy",
            value:
              "camera=(), microphone=(), geolocation=(), payment=(), usb=(), browsing-topics=()",
          },
          { key: "Cross-Origin-Opener-Policy", value: "same-origin" },
          { key: "Strict-Transport-Security", value: "max-age=31536000" },
        ],
      },
    ]),
  allowedDevOrigins: ["127.0.0.1", "localhost"],
};

export default config;
