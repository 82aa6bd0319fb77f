import { allDigits, type FigureUnit, fourDigits } from "./figures";

/** A figure: four significant digits on screen, all of them on hover; a dash with its reason where there is none. */
export function Figure({
  value,
  unit = "plain",
  otherwise = "There is no such figure here.",
}: {
  value: number | null;
  unit?: FigureUnit;
  otherwise?: string;
}) {
  if (value === null) return <span title={otherwise}>—</span>;
  return (
    <span className="figure" title={allDigits(value, unit)}>
      {fourDigits(value, unit)}
    </span>
  );
}
