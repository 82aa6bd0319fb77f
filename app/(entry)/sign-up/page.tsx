import { safeNext } from "../../_ui/safeNext";
import { EntryForm } from "../EntryForm";

export const metadata = { title: "Make an account" };

export default async function Page({ searchParams }: { searchParams: Promise<{ next?: string }> }) {
  const { next } = await searchParams;
  return <EntryForm kind="sign-up" next={safeNext(next)} />;
}
