import type { EditField } from "@/components/records/edit-fields";

export interface CustomerFacts {
  name: string;
  phone: string | null;
  email: string | null;
  address: string | null;
  note: string | null;
}

/** What the shop keeps of a customer, as a dialog asks it. */
export function customerFields(known?: CustomerFacts): EditField[] {
  return [
    { kind: "text", name: "name", label: "Name", value: known?.name, max: 120 },
    { kind: "text", name: "phone", label: "Phone", value: known?.phone, type: "tel", max: 40, optional: true },
    {
      kind: "text",
      name: "email",
      label: "E-mail",
      value: known?.email,
      type: "email",
      max: 200,
      optional: true,
      hint: "Quotes and invoices go here. Without it the counter hands the link over.",
    },
    { kind: "area", name: "address", label: "Address", value: known?.address, max: 300, optional: true },
    { kind: "area", name: "note", label: "Note", value: known?.note, max: 1000, optional: true },
  ];
}
