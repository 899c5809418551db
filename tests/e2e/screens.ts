/** Every screen, by who looks at it. `{n}` is the number of a case in that stage, looked up in the cases list. */
export interface Screen {
  name: string;
  path: string;
  as: "owner" | "writer" | "technician" | "nobody";
}

export const CASE_PARTS = ["intake", "readings", "causes", "quote", "repair", "proof", "papers"] as const;

export const SCREENS: readonly Screen[] = [
  { name: "sign-in", path: "/sign-in", as: "nobody" },
  { name: "sign-up", path: "/sign-up", as: "nobody" },
  { name: "reset", path: "/reset", as: "nobody" },
  { name: "invitation-over", path: "/invitation/none", as: "nobody" },
  { name: "link-unknown", path: `/q/${"A".repeat(43)}`, as: "nobody" },
  { name: "cases", path: "/cases?show=all", as: "technician" },
  { name: "cases-mine", path: "/cases?show=mine", as: "technician" },
  { name: "cases-found", path: "/cases?q=Corvid", as: "writer" },
  { name: "cases-nothing-found", path: "/cases?q=zzzz", as: "writer" },
  { name: "new-case", path: "/cases/new", as: "writer" },
  { name: "customers", path: "/customers", as: "writer" },
  { name: "vehicles", path: "/vehicles", as: "technician" },
  { name: "prices", path: "/prices", as: "writer" },
  { name: "audit", path: "/audit", as: "owner" },
  { name: "reports", path: "/reports", as: "owner" },
  { name: "settings", path: "/settings", as: "owner" },
  { name: "audit-not-allowed", path: "/audit", as: "technician" },
];
