import { gunzipSync, gzipSync } from "node:zlib";
import type { PricingReport } from "../pricing/report";
import type { PricingRequest } from "../pricing/request";

/** Text as it is kept in a run. */
export function packed(text: string): Uint8Array<ArrayBuffer> {
  return new Uint8Array(gzipSync(text));
}

export function unpackedText(bytes: Uint8Array): string {
  return gunzipSync(bytes).toString("utf8");
}

export function unpackedRequest(bytes: Uint8Array): PricingRequest {
  return JSON.parse(unpackedText(bytes)) as PricingRequest;
}

export function unpackedReport(bytes: Uint8Array): PricingReport {
  return JSON.parse(unpackedText(bytes)) as PricingReport;
}
