import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { companies, passwordHashes, rooms, travelTimes, venues } from "@/db/schema";
import { hashPassword } from "@/lib/auth/password";
import { addUser, give, joinCompany } from "./context";
import type { SeedPerson } from "./context";

export type DemoPerson = { name: string; email: string; position: string };

/** The people one can sign in as, in the order they are printed. */
export const DEMO_PEOPLE = {
  md: { name: "Runa Oake", email: "runa.oake@demo.example", position: "Music director" },
  assistant: {
    name: "Ilse Varga",
    email: "ilse.varga@demo.example",
    position: "Assistant music director",
  },
  stageManager: {
    name: "Bram Teller",
    email: "bram.teller@demo.example",
    position: "Stage manager",
  },
  director: {
    name: "Odile Castellane",
    email: "odile.castellane@demo.example",
    position: "Director, at the table",
  },
  hanne: { name: "Hanne Briscoe", email: "hanne.briscoe@demo.example", position: "Accompanist" },
  osric: { name: "Osric Dlamini", email: "osric.dlamini@demo.example", position: "Accompanist" },
  wren: {
    name: "Wren Tallis",
    email: "wren.tallis@demo.example",
    position: "Actor: a slot and a callback to answer",
  },
  teodor: {
    name: "Teo Sandoval-Reyes",
    email: "teo.sandoval-reyes@demo.example",
    position: "Actor: cast, with calls this week",
  },
  imke: {
    name: "Imke Dorne",
    email: "imke.dorne@demo.example",
    position: "Actor: new, invited to audition",
  },
  admin: { name: "Cora Finch", email: "cora.finch@demo.example", position: "Company admin" },
} satisfies Record<string, DemoPerson>;

type Key = keyof typeof DEMO_PEOPLE;

export type Companies = {
  lantern: string;
  fenmoor: string;
  rooms: { one: string; two: string; hall: string; fenmoorHall: string; fenmoorStudio: string };
  /** Records of the demo's people in each company. */
  atLantern: Record<Key, string>;
  atFenmoor: Record<Key, string>;
};

/** Two companies with their places, and the people one can sign in as, known to both. */
export async function seedCompanies(tx: Tx, password: string): Promise<Companies> {
  const lantern = newId();
  const fenmoor = newId();
  await tx.insert(companies).values([
    { id: lantern, name: "Lantern Street Theatre", zone: "Europe/London", paper: "A4" },
    { id: fenmoor, name: "Fenmoor Conservatory", zone: "Europe/London", paper: "A4" },
  ]);
  const quay = newId();
  const annexe = newId();
  const conservatory = newId();
  await tx.insert(venues).values([
    { id: quay, companyId: lantern, name: "Lantern Street", address: "4 Quay Lane, Saltmarsh" },
    { id: annexe, companyId: lantern, name: "The Rope Walk", address: "17 Rope Walk, Saltmarsh" },
    {
      id: conservatory,
      companyId: fenmoor,
      name: "Fenmoor Conservatory",
      address: "Causeway Road, Fenmoor",
    },
  ]);
  const made = {
    one: newId(),
    two: newId(),
    hall: newId(),
    fenmoorHall: newId(),
    fenmoorStudio: newId(),
  };
  await tx.insert(rooms).values([
    { id: made.one, companyId: lantern, venueId: quay, name: "Room 1" },
    { id: made.two, companyId: lantern, venueId: quay, name: "Room 2" },
    { id: made.hall, companyId: lantern, venueId: annexe, name: "Rope Hall" },
    { id: made.fenmoorHall, companyId: fenmoor, venueId: conservatory, name: "Great Hall" },
    { id: made.fenmoorStudio, companyId: fenmoor, venueId: conservatory, name: "Studio 3" },
  ]);
  for (const [one, other, minutes] of [
    [quay, annexe, 15],
    [quay, conservatory, 35],
    [annexe, conservatory, 40],
  ] as const) {
    const [venueA, venueB] = one < other ? [one, other] : [other, one];
    await tx.insert(travelTimes).values({ venueA, venueB, minutes });
  }

  const hash = await hashPassword(password);
  const users = {} as Record<Key, SeedPerson>;
  const atLantern = {} as Record<Key, string>;
  const atFenmoor = {} as Record<Key, string>;
  let line = 10;
  for (const key of Object.keys(DEMO_PEOPLE) as Key[]) {
    const person = DEMO_PEOPLE[key];
    const user = await addUser(tx, person.name, person.email);
    users[key] = user;
    if (user.userId) await tx.insert(passwordHashes).values({ userId: user.userId, hash });
    const phone = `0000 555 0${String((line += 1))}`;
    atLantern[key] = await joinCompany(tx, lantern, user, { phone });
    if (key !== "admin" && key !== "stageManager" && key !== "imke")
      atFenmoor[key] = await joinCompany(tx, fenmoor, user, { phone });
  }
  await give(tx, lantern, atLantern.admin, "company_admin", null);
  await give(tx, lantern, atLantern.md, "music_director", null);
  await give(tx, fenmoor, atFenmoor.md, "music_director", null);
  return { lantern, fenmoor, rooms: made, atLantern, atFenmoor };
}
