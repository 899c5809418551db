import { redirect } from "next/navigation";
import type { Stage } from "@/lib/cases/stages";
import { loadCase, type PartParams } from "./_views/load";

const OPENS_ON: Record<Stage, string> = {
  intake: "intake",
  testing: "readings",
  quoting: "quote",
  waiting: "quote",
  repair: "repair",
  proof: "proof",
  closed: "papers",
  released: "papers",
  parked: "intake",
};

/** A case opens on the part its stage is about. */
export default async function CasePage({ params }: PartParams) {
  const { number } = await params;
  const { view } = await loadCase(number);
  const { stage, parkedFrom } = view.parts.row;
  redirect(`/cases/${number}/${OPENS_ON[(stage === "parked" && parkedFrom ? parkedFrom : stage) as Stage]}`);
}
