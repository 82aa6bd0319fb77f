import type { Transaction } from "../db/client";

/** The names of people by their ids, for showing who did what; someone whose account is gone is "a former member". */
export async function peopleNames(tx: Transaction, ids: readonly string[]): Promise<(id: string) => string> {
  const people = await tx.user.findMany({
    where: { id: { in: [...new Set(ids)] } },
    select: { id: true, name: true },
  });
  const names = new Map(people.map((person) => [person.id, person.name]));
  return (id) => names.get(id) ?? "a former member";
}
