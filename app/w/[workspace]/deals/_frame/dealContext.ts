"use client";

import { createContext, useContext } from "react";
import type { DealForm, DealReading } from "@/lib/deals/form";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";
import type { NameInput, PricingRequest } from "@/lib/pricing/request";
import type { Draft } from "./useDraft";
import type { Parts } from "./useParts";

export type OpenDeal = Operations["deals.open"]["output"];

export interface MarketChoice {
  readonly id: string;
  readonly name: string;
  readonly pricingDate: string;
  readonly scheduleKind: "even" | "standard";
}

/** What every room of a deal's desk works on. */
export interface DealAtHand {
  readonly workspaceId: string;
  /** The deal as saved; null for one that is not stored yet. */
  readonly deal: OpenDeal | null;
  readonly mayEdit: boolean;
  readonly mayWork: boolean;
  readonly pools: readonly { readonly id: string; readonly name: string }[];
  readonly markets: readonly MarketChoice[];
  readonly scheduleKind: "even" | "standard";
  readonly saved: DealForm;
  readonly draft: Draft;
  /** The deal as typed; kept in this browser until saved. */
  readonly form: DealForm;
  change(part: Partial<DealForm>, gesture?: string | null): void;
  readonly isDirty: boolean;
  /** Someone saved a newer version since the typing began. */
  readonly isBehind: boolean;
  readonly reading: DealReading;
  /** Why the deal does not read, or why the server refused it. */
  readonly problems: readonly Problem[];
  readonly refused: readonly Problem[];
  problemAt(path: string): string | undefined;
  /** The saved pool and market; null while they are fetched. */
  readonly parts: Parts | null;
  /** Names tried in the pool's place, not saved; null when none are. */
  readonly tried: readonly NameInput[] | null;
  tryNames(names: readonly NameInput[] | null): void;
  /** The request of what is typed; null while it does not read or its parts are not there. */
  readonly request: PricingRequest | null;
  readonly isSaving: boolean;
  /** Saves what is typed; the new version, or null when it was refused. */
  save(): Promise<number | null>;
}

export const DealContext = createContext<DealAtHand | null>(null);

/** The deal whose desk this is. */
export function useDeal(): DealAtHand {
  const deal = useContext(DealContext);
  if (!deal) throw new Error("A room of a deal's desk stands inside its frame.");
  return deal;
}
