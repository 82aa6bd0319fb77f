import type { ClassText, DealForm } from "./form";

/** A field that two people changed differently. `path` names it: `maturity`, `classes/K/running`, `classes/K`. */
export interface FormConflict {
  readonly path: string;
  readonly label: string;
  readonly mine: string;
  readonly theirs: string;
}

/** Both versions of a deal laid together: what only one side changed is taken; the rest is for the person to choose. */
export interface MergedForm {
  /** The merged form; in a conflict it has the person's own text. */
  readonly form: DealForm;
  readonly conflicts: readonly FormConflict[];
}

type Scalar = Exclude<keyof DealForm, "classes" | "correlation">;
const scalars: Readonly<Record<Scalar, string>> = {
  name: "Name",
  poolId: "Pool",
  marketId: "Market",
  maturity: "Maturity",
  years: "Maturity (years)",
  rho: "Flat asset correlation (%)",
  law: "Loss law",
  nthToDefault: "n-th-to-default contracts",
  notes: "Notes",
};
const classFields = {
  name: "name",
  attachment: "attachment (%)",
  detachment: "detachment (%)",
  running: "coupon (bp)",
  upfront: "upfront (%)",
} as const;

/** Lays what someone typed since `base` over a version that someone else saved since `base`: field by field, class by class. */
export function mergeForms(base: DealForm, mine: DealForm, theirs: DealForm): MergedForm {
  const conflicts: FormConflict[] = [];
  const pick = <Value>(path: string, label: string, was: Value, own: Value, other: Value): Value => {
    if (isSame(own, other) || isSame(own, was)) return other;
    if (!isSame(other, was)) conflicts.push({ path, label, mine: textOf(own), theirs: textOf(other) });
    return own;
  };
  const fields = Object.fromEntries(
    (Object.keys(scalars) as Scalar[]).map((key) => [
      key,
      pick(key, scalars[key], base[key], mine[key], theirs[key]),
    ]),
  ) as Pick<DealForm, Scalar>;
  const correlation = pick(
    "correlation",
    "Correlation",
    base.correlation,
    mine.correlation,
    theirs.correlation,
  );
  return {
    form: { ...fields, correlation, classes: mergeClasses(base, mine, theirs, pick, conflicts) },
    conflicts,
  };
}

/** The form with the other side's text where the person chose it. */
export function withTheirs(merged: MergedForm, theirs: DealForm, paths: ReadonlySet<string>): DealForm {
  let { form } = merged;
  for (const path of paths) {
    const [field = "", key, part] = path.split("/");
    if (field !== "classes") form = { ...form, [field]: theirs[field as keyof DealForm] };
    else form = { ...form, classes: classesWithTheirs(form.classes, theirs.classes, key ?? "", part) };
  }
  return form;
}

type Pick3 = <Value>(path: string, label: string, was: Value, own: Value, other: Value) => Value;

function mergeClasses(
  base: DealForm,
  mine: DealForm,
  theirs: DealForm,
  pick: Pick3,
  conflicts: FormConflict[],
): ClassText[] {
  const [was, own, other] = [base, mine, theirs].map(
    (form) => new Map(form.classes.map((row) => [row.key, row])),
  );
  const keys = [...new Set([...theirs.classes, ...mine.classes].map(({ key }) => key))];
  return keys.flatMap((key) => {
    const [before, ours, saved] = [was!.get(key), own!.get(key), other!.get(key)];
    const path = `classes/${key}`;
    if (!before) return ours && saved ? [mergedClass(path, saved, ours, saved, pick)] : [(ours ?? saved)!];
    if (ours && saved) return [mergedClass(path, before, ours, saved, pick)];
    const left = ours ?? saved;
    if (!left || isSame(left, before)) return [];
    const label = `Class ${before.name}`;
    conflicts.push({
      path,
      label,
      mine: ours ? classWords(ours) : "removed",
      theirs: saved ? classWords(saved) : "removed",
    });
    return ours ? [ours] : [];
  });
}

function mergedClass(path: string, was: ClassText, own: ClassText, other: ClassText, pick: Pick3): ClassText {
  const fields = (Object.keys(classFields) as (keyof typeof classFields)[]).map((field) => [
    field,
    pick(
      `${path}/${field}`,
      `Class ${was.name}, ${classFields[field]}`,
      was[field],
      own[field],
      other[field],
    ),
  ]);
  return { ...other, ...Object.fromEntries(fields) };
}

function classesWithTheirs(
  rows: readonly ClassText[],
  theirs: readonly ClassText[],
  key: string,
  part: string | undefined,
): ClassText[] {
  const saved = theirs.find((row) => row.key === key);
  if (part === undefined) {
    const rest = rows.filter((row) => row.key !== key);
    return saved ? [...rest, saved] : rest;
  }
  return rows.map((row) =>
    row.key === key && saved ? { ...row, [part]: saved[part as keyof ClassText] } : row,
  );
}

function classWords({ attachment, detachment, running, upfront }: ClassText): string {
  return `${attachment} to ${detachment} %, coupon ${running || "none"}, upfront ${upfront || "none"}`;
}

function textOf(value: unknown): string {
  if (typeof value === "string") return value;
  const { kind } = value as { kind?: string };
  return kind ?? JSON.stringify(value);
}

function isSame(one: unknown, other: unknown): boolean {
  return JSON.stringify(one) === JSON.stringify(other);
}
