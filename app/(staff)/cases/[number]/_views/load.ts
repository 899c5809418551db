import { notFound } from "next/navigation";
import { cache } from "react";
import { pageCtx } from "@/lib/auth/session";
import { AppError } from "@/lib/errors";
import { readCase } from "@/lib/services/cases/read";

/** The signed-in person and the case of the address, read once a request. */
export const loadCase = cache(async (number: string) => {
  const ctx = await pageCtx();
  try {
    return { ctx, view: await readCase(ctx, /^\d{1,9}$/.test(number) ? Number(number) : 0) };
  } catch (error) {
    if (error instanceof AppError && error.code === "not_found") notFound();
    throw error;
  }
});

export type PartParams = { params: Promise<{ number: string }> };
