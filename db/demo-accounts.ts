import { env } from "@/lib/env";
import type { Role } from "@/lib/schema/roles";

export type DemoAccount = { name: string; email: string; role: Role; password: string };

const accounts: DemoAccount[] = [
  { name: "Ines Kallweit", email: "ines.kallweit@larkfield.example", role: "engineer", password: "forebay-engineer" },
  { name: "Tomas Berg", email: "tomas.berg@larkfield.example", role: "manager", password: "forebay-manager" },
  { name: "Maren Oduya", email: "maren.oduya@larkfield.example", role: "owner", password: "forebay-owner" },
  { name: "Pavel Orsk", email: "pavel.orsk@larkfield.example", role: "viewer", password: "forebay-viewer" },
];

/** The demo's accounts with their passwords, for the sign-in page; none anywhere but in the demo and in development. */
export function demoAccounts(): DemoAccount[] {
  return env.isLocal ? accounts : [];
}
