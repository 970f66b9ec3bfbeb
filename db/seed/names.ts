/** Invented people, with names from many places; put together by rule, so that a new demo has the same ones. */
const GIVEN = [
  "Ottoline",
  "Kit",
  "Dele",
  "Noor",
  "Ciarán",
  "Pomona",
  "Junia",
  "Teodor",
  "Sabela",
  "Ivo",
  "Marguerite",
  "Jun-ho",
  "Alba",
  "Rafe",
  "Hester",
  "Lior",
  "Cass",
  "Yusra",
  "Dov",
  "Esi",
  "Tam",
  "Bronagh",
  "Silas",
  "Ines",
  "Anneke",
  "Zofia",
  "Mateus",
  "Linh",
  "Aroha",
  "Björn",
  "Chidi",
  "Fatou",
  "Goran",
  "Hana",
  "Ikaika",
  "Jarek",
  "Keala",
  "Leocadia",
  "Minh",
  "Nkem",
  "Oyelaran",
  "Paloma",
  "Quilla",
  "Rosheen",
  "Søren",
  "Tavita",
  "Ulla",
  "Vesna",
  "Wioletta",
  "Xiomara",
  "Ynez",
  "Zahra",
  "Anselmo",
  "Bashir",
  "Catalin",
  "Damaris",
];
const FAMILY = [
  "Marsh",
  "Abara",
  "Fashanu-Price",
  "Haddad-Lunn",
  "Obuya",
  "Giles",
  "Vale",
  "Lindqvist-Amara",
  "Roque",
  "Penhale",
  "Osei",
  "Whitlock",
  "Severin",
  "Okonjo",
  "Bloom",
  "Achterberg",
  "Fenwick",
  "Malik-Thorne",
  "Penrose",
  "Calloway",
  "Brightwell",
  "Eze",
  "Verma",
  "Halloran",
  "Dekkers",
  "Wrona",
  "Sardinha",
  "Tranh",
  "Tamihana",
  "Sandahl",
  "Nwachuku",
  "Diabaté",
  "Perkovac",
  "Morimoto",
  "Kahananui",
  "Zelenko",
  "Makoa",
  "Brisebois",
  "Quang",
  "Onwuachi",
  "Adeyinka",
  "Quintela",
  "Sumaq",
  "Kinsella",
  "Østgaard",
  "Leavai",
  "Rautio",
  "Babić",
  "Pawlik",
  "Altagracia",
  "Ferrándiz",
  "Rahimov",
  "Bellarosa",
  "Qureshy",
  "Dragomirov",
  "Wexley",
];

/** The `index`-th invented name; all different up to the number of given names times three. */
export function inventedName(index: number): string {
  const round = Math.floor(index / GIVEN.length);
  const given = GIVEN[index % GIVEN.length] ?? "Ada";
  const family = FAMILY[(index + round * 17) % FAMILY.length] ?? "Vale";
  return `${given} ${family}`;
}

/** "ciaran.obuya@singers.example" from "Ciarán Obuya": a domain that can never receive mail (RFC 2606). */
export function inventedEmail(name: string, domain = "singers.example"): string {
  const plain = name
    .normalize("NFD")
    .replace(/\p{M}/gu, "")
    .replace(/[øØ]/g, "o")
    .toLowerCase()
    .replace(/[^a-z]+/g, ".");
  return `${plain}@${domain}`;
}

/** A number from 0 up to 1 that is the same for the same seed: invented data must not change from run to run. */
export function steady(seed: number): number {
  const x = Math.sin(seed * 12.9898 + 78.233) * 43758.5453;
  return x - Math.floor(x);
}
