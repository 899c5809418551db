"use client";

import { useRouter } from "next/navigation";
import type { CustomerChoice, OpenCase } from "@/components/intake/model";
import { NewCaseForm, type NewCaseFormProps } from "@/components/intake/new-case-form";
import { act, fieldErrorsOf, sentenceOf } from "../../../_client/act";

async function findCustomers(query: string): Promise<CustomerChoice[]> {
  const response = await fetch(`/api/customers?q=${encodeURIComponent(query)}`);
  return response.ok ? response.json() : [];
}

export type NewCaseClientProps = Omit<NewCaseFormProps, "findCustomers" | "openCase" | "go"> & { comebackOf?: string };

export function NewCaseClient({ comebackOf, ...props }: NewCaseClientProps) {
  const router = useRouter();
  const openCase: OpenCase = async (input, then) => {
    const opened = await act<{ id: string; number: number }>(
      "case.open",
      comebackOf ? { ...input, comebackOf } : input,
    );
    if (!opened.ok)
      return { ok: false, message: sentenceOf(opened.problem), fieldErrors: fieldErrorsOf(opened.problem) };
    const href = `/cases/${opened.data.number}`;
    if (then === "testing") {
      const moved = await act("case.advance", { caseId: opened.data.id, to: "testing" });
      return { ok: true, href: moved.ok ? `${href}/readings` : `${href}/intake` };
    }
    return { ok: true, href: `${href}/intake` };
  };
  return <NewCaseForm {...props} findCustomers={findCustomers} openCase={openCase} go={(href) => router.push(href)} />;
}
