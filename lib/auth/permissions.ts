export const STAFF_ROLES = ["owner", "writer", "technician"] as const;
export type StaffRole = (typeof STAFF_ROLES)[number];
/** `customer` acts through a link, `system` is the worker inside the shop whose row it handles. */
export type Role = StaffRole | "customer" | "system";

/**
 * Who may do what. This table is the only one: the server asks it in every verb and the screens ask it for what to
 * show. What depends on the object (one's own case, one's own clock) is said by the policies beside the verbs.
 */
export const PERMISSIONS = {
  "case.read": ["owner", "writer", "technician"],
  "case.open": ["owner", "writer", "technician"],
  "case.editIntake": ["owner", "writer", "technician"],
  "case.assign": ["owner", "writer"],
  "case.promise": ["owner", "writer"],
  "case.park": ["owner", "writer", "technician"],
  "case.advance": ["owner", "writer", "technician"],
  "case.release": ["owner", "writer"],
  "case.comeback": ["owner", "writer"],
  "case.waiveProof": ["owner"],
  "customer.edit": ["owner", "writer"],
  "vehicle.edit": ["owner", "writer", "technician"],
  "diagnosis.authorize": ["owner", "writer"],
  "reading.write": ["owner", "writer", "technician"],
  "test.record": ["owner", "writer", "technician"],
  "cause.mark": ["owner", "technician"],
  "quote.draft": ["owner", "writer", "technician"],
  "quote.price": ["owner", "writer"],
  "quote.send": ["owner", "writer"],
  "quote.answerQuestion": ["owner", "writer"],
  "quote.ask": ["customer"],
  "cost.see": ["owner", "writer"],
  "approval.give": ["customer"],
  "approval.record": ["writer", "owner"],
  "work.write": ["owner", "writer", "technician"],
  "work.clock": ["owner", "writer", "technician"],
  "work.correctClock": ["owner"],
  "work.strike": ["owner", "writer"],
  "invoice.issue": ["owner", "writer"],
  "payment.record": ["owner", "writer"],
  "price.parts": ["owner", "writer"],
  "price.setJobs": ["owner", "writer"],
  "price.rates": ["owner", "writer"],
  "price.taxes": ["owner"],
  "people.manage": ["owner"],
  "settings.edit": ["owner"],
  "audit.read": ["owner"],
  "report.read": ["owner"],
  "file.process": ["system"],
  "mail.deliver": ["system"],
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof PERMISSIONS;

/** An unknown role or action is refused. */
export function mayDo(role: Role, action: Action): boolean {
  return (PERMISSIONS[action] as readonly Role[] | undefined)?.includes(role) ?? false;
}

export const isStaffRole = (role: string): role is StaffRole => (STAFF_ROLES as readonly string[]).includes(role);
