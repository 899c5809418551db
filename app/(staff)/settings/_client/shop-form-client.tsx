"use client";

import { useRouter } from "next/navigation";
import { type SavedShop, type SaveShop, ShopForm } from "@/components/settings/shop-form";
import { shopSettings } from "@/lib/shops/schema";
import { act, fieldErrorsOf, sentenceOf } from "../../_client/act";

const save: SaveShop = async (shop) => {
  const answer = await act<{ version: number }>("shop.saveSettings", shop);
  if (answer.ok) return { ok: true, version: answer.data.version };
  const { problem } = answer;
  const current = problem.code === "conflict" ? (problem.current as SavedShop | undefined) : undefined;
  return {
    ok: false,
    message: sentenceOf(problem),
    fields: fieldErrorsOf(problem),
    ...(current ? { current: { ...current, settings: shopSettings.parse(current.settings) } } : {}),
  };
};

export interface ShopFormClientProps {
  shop: SavedShop;
  timeZones: readonly string[];
  currencies: readonly string[];
}

export function ShopFormClient(props: ShopFormClientProps) {
  const router = useRouter();
  return <ShopForm {...props} save={save} onSaved={() => router.refresh()} />;
}
