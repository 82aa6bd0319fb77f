import { allDigits, type FigureUnit, fourDigits } from "./figures";

/** A figure: four significant digits on screen, all of them on hover and copy; a dash with its reason where there is none. */
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
  const full = allDigits(value, unit);
  return (
    <span className="figure" title={full} data-full={full}>
      {fourDigits(value, unit)}
    </span>
  );
}
