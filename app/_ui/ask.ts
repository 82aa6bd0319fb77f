import { headers } from "next/headers";
import { notFound, redirect } from "next/navigation";
import { Refusal } from "@/lib/platform/errors";
import type { Query } from "@/lib/platform/operation";
import { serve } from "@/lib/platform/serve";

/** Runs a query for the page being rendered: signed out leads to signing in, what does not exist to the page that says so. */
export async function ask<Input, Output>(
  query: Query<string, Input, Output>,
  input: NoInfer<Input>,
): Promise<Output> {
  try {
    return await serve(query, input, await headers());
  } catch (error) {
    if (error instanceof Refusal && error.kind === "signedOut") redirect("/sign-in");
    if (error instanceof Refusal && error.kind === "notFound") notFound();
    throw error;
  }
}
