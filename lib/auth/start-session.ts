import "server-only";
import { headers } from "next/headers";
import type { AdapterSession } from "next-auth/adapters";
import { insertSession } from "@/lib/data/sessions";

/** Writes the session with the device it began on, so that its owner can tell their sessions apart. */
export async function startSession(session: AdapterSession): Promise<AdapterSession> {
  const agent = (await headers()).get("user-agent") ?? "";
  await insertSession(session, describeDevice(agent));
  return session;
}

/** "Firefox on Android" from a user-agent string; "An unknown device" when it says nothing. */
export function describeDevice(agent: string): string {
  const browser = /Edg\//.test(agent)
    ? "Edge"
    : /Firefox\//.test(agent)
      ? "Firefox"
      : /Chrom(e|ium)\//.test(agent)
        ? "Chrome"
        : /Safari\//.test(agent)
          ? "Safari"
          : null;
  const system = /iPhone|iPad/.test(agent)
    ? "iOS"
    : /Android/.test(agent)
      ? "Android"
      : /Windows/.test(agent)
        ? "Windows"
        : /Mac OS X/.test(agent)
          ? "macOS"
          : /Linux|X11/.test(agent)
            ? "Linux"
            : null;
  if (!browser && !system) return "An unknown device";
  return [browser ?? "A browser", system ? `on ${system}` : ""].join(" ").trim();
}
