/** What of a pool's loss falls on a tranche: min((L − A)⁺, D − A), all fractions of the pool's initial notional. */
export function lossInside(
  loss: number,
  { attachment, detachment }: { readonly attachment: number; readonly detachment: number },
): number {
  return Math.min(Math.max(loss - attachment, 0), detachment - attachment);
}
