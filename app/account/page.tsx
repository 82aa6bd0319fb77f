import { queries } from "@/lib/workspaces/queries";
import { ask } from "../_ui/ask";
import { safeNext } from "../_ui/safeNext";
import { PasswordForm } from "./PasswordForm";

export const metadata = { title: "Account" };

export default async function Page({ searchParams }: { searchParams: Promise<{ back?: string }> }) {
  const { actor } = await ask(queries.mine, {});
  const { back } = await searchParams;
  return <PasswordForm name={actor.name} email={actor.email} back={safeNext(back)} />;
}
