import { mkdir, writeFile } from "node:fs/promises";
import path from "node:path";
import { eq } from "drizzle-orm";
import { closePool, db } from "@/db/client";
import { users } from "@/db/schema";
import { seedCandlemas } from "./a-fair-at-candlemas";
import { DEMO_PEOPLE, seedCompanies } from "./cast-of-the-demo";
import { seedMarrowStreet } from "./marrow-street";
import { seedTidewatcher } from "./the-tidewatcher";

/**
 * Loads the demo season once: two invented companies, three productions at different stages, dates set from today.
 * DEMO_PASSWORD is everyone's password. Who can sign in is written to `.run/demo-people.json` for the start command.
 */
async function seed(): Promise<void> {
  const [already] = await db
    .select({ id: users.id })
    .from(users)
    .where(eq(users.email, DEMO_PEOPLE.md.email));
  if (already) {
    console.log("The demo season is there already.");
    return;
  }
  const password = process.env["DEMO_PASSWORD"];
  if (!password) throw new Error("DEMO_PASSWORD is not set: the start command makes one.");
  const doorSecret = await db.transaction(async (tx) => {
    const companies = await seedCompanies(tx, password);
    const tidewatcher = await seedTidewatcher(tx, companies);
    await seedCandlemas(tx, companies);
    await seedMarrowStreet(tx, companies);
    return tidewatcher.doorSecret;
  });
  const runDir = path.join(import.meta.dirname, "../../.run");
  await mkdir(runDir, { recursive: true });
  await writeFile(
    path.resolve(runDir, process.env["DEMO_PEOPLE_FILE"] ?? "demo-people.json"),
    JSON.stringify(
      {
        people: Object.values(DEMO_PEOPLE),
        links: [{ label: "Monitor, at the door today", path: `/door/${doorSecret}` }],
      },
      null,
      2,
    ),
  );
  console.log("The demo season is loaded.");
}

try {
  await seed();
} finally {
  await closePool();
}
