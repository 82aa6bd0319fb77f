import { Text } from "@mantine/core";
import { Figure } from "@/app/_ui/Figure";
import type { FigureUnit } from "@/app/_ui/figures";
import type { Pin } from "@/lib/discussion/queries";
import { pinWords } from "./pinWords";

const units: readonly [RegExp, FigureUnit, string][] = [
  [
    /(expectedLoss|Probability|probability|protectionLeg|lossGivenHit|standardDeviation|upfrontAtRunning|realisedLoss|unit)$/,
    "percent",
    "%",
  ],
  [/parSpread$/, "basisPoints", "bp"],
  [/(sellerValue|notional)$/, "money", "in the deal's currency"],
  [/annuity$/, "years", "years"],
];

/** What a thread is pinned to; a figure with its value then, now, and the change. */
export function PinThenNow({ pin }: { pin: Pin }) {
  if (pin.kind === "deal") return null;
  if (pin.kind !== "figure")
    return (
      <Text size="sm" fw={600}>
        {pinWords(pin)}
      </Text>
    );
  const [, unit, words] = units.find(([pattern]) => pattern.test(pin.path)) ?? [null, "plain" as const, ""];
  const { valueThen, valueNow, latestRun } = pin;
  const change = valueThen === null || valueNow === null ? null : valueNow - valueThen;
  return (
    <Text size="sm">
      <b>{pin.label}</b> {words && `(${words})`}: then, run {pin.run},{" "}
      <Figure value={valueThen} unit={unit} />
      {latestRun === pin.run ? (
        " (the latest run is still that one)"
      ) : (
        <>
          {" "}
          | now, run {latestRun},{" "}
          <Figure value={valueNow} unit={unit} otherwise="The latest run has no such class or figure." /> |
          change <Figure value={change} unit={unit} otherwise="The latest run has no such class or figure." />
        </>
      )}
    </Text>
  );
}
