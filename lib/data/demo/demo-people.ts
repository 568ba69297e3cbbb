import type { Person } from "@/lib/schemas/person";

/** Everyone's password in the demo laboratory. */
export const DEMO_PASSWORD = "still-water";

export const demoSite = { name: "Thornmere Wind Service", place: "instrument workshop" };

/** The people of the workshop, one for each role. */
export const demoPeople: readonly Omit<Person, "id">[] = [
  { name: "Ines Marlow", email: "ines.marlow@thornmere.example", roles: ["technician"], active: true },
  { name: "Tomas Reyl", email: "tomas.reyl@thornmere.example", roles: ["engineer", "technician"], active: true },
  { name: "Ada Fenn", email: "ada.fenn@thornmere.example", roles: ["supervisor"], active: true },
  { name: "Ruth Okafor", email: "ruth.okafor@thornmere.example", roles: ["reviewer"], active: true },
  { name: "Sam Idris", email: "sam.idris@thornmere.example", roles: ["administrator"], active: true },
];
