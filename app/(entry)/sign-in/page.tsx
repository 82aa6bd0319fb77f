import { safeNext } from "../../_ui/safeNext";
import { EntryForm } from "../EntryForm";

export const metadata = { title: "Sign in" };

export default async function Page({ searchParams }: { searchParams: Promise<{ next?: string }> }) {
  const { next } = await searchParams;
  return <EntryForm kind="sign-in" next={safeNext(next)} />;
}
