"use client";

import { useEffect, useRef, useState } from "react";
import { EngineLine } from "@/lib/compute/browserEngine";
import type { Problem } from "@/lib/platform/errors";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";

/** Figures of a request as it is typed, priced in this browser. */
export interface Priced {
  /** The newest report there is; while a newer request is priced, that of an older one. */
  readonly report: PricingReport | null;
  /** The request that the report answers. */
  readonly of: PricingRequest | null;
  readonly problems: readonly Problem[];
  readonly isBusy: boolean;
  readonly milliseconds: number | null;
}

const nothing: Priced = { report: null, of: null, problems: [], isBusy: false, milliseconds: null };

/** Prices a request in this browser's own engine whenever it changes; the newest wins. */
export function usePriced(request: PricingRequest | null): Priced {
  const line = useRef<EngineLine | null>(null);
  const [priced, setPriced] = useState<Priced>(nothing);
  useEffect(() => {
    return () => {
      line.current?.close();
      line.current = null;
    };
  }, []);
  useEffect(() => {
    if (!request) return;
    line.current ??= new EngineLine();
    setPriced((before) => ({ ...before, isBusy: true }));
    line.current.run("price", request).then(
      (answer) => {
        if (answer === null) return;
        if (!answer.ok) setPriced((before) => ({ ...before, problems: answer.problems, isBusy: false }));
        else {
          const report = JSON.parse(answer.report) as PricingReport;
          const { milliseconds } = answer;
          setPriced({ report, of: request, problems: [], isBusy: false, milliseconds });
        }
      },
      ({ message }: Error) =>
        setPriced((before) => ({
          ...before,
          problems: [{ code: "engine", path: "", message }],
          isBusy: false,
        })),
    );
  }, [request]);
  return priced;
}
