"use client";

import { Alert, Loader, Text, TextInput, Title } from "@mantine/core";
import { useMemo } from "react";
import { Problems } from "@/app/_ui/Problems";
import { usePriced } from "@/app/_ui/usePriced";
import { useDeal } from "../_frame/dealContext";
import { Contracts } from "./Contracts";
import { Pairs } from "./Pairs";

/** Names above this are not laid out as a matrix: a pool of thousands has millions of pairs. */
const MOST_PAIRED = 400;

/** The room of the order of defaults: n-th-to-default contracts, and how two names default together. */
export function Order() {
  const { form, change, mayEdit, request, problems, problemAt } = useDeal();
  const contracts = useMemo(() => request && { ...request, tranches: [], include: [] }, [request]);
  const isPaired =
    request !== null && request.pool.length <= MOST_PAIRED && request.correlation.kind !== "base";
  const paired = useMemo(
    () =>
      isPaired && request
        ? { ...request, tranches: [], nthToDefault: [], include: ["pairs" as const] }
        : null,
    [isPaired, request],
  );
  const nth = usePriced(contracts);
  const pairs = usePriced(paired);
  return (
    <>
      <Title order={2} size="h4">
        n-th to default
      </Title>
      <TextInput
        size="xs"
        maw={420}
        label="Contracts priced: n, parted by commas"
        placeholder="1, 2, 3"
        disabled={!mayEdit}
        value={form.nthToDefault}
        error={problemAt("content.nthToDefault")}
        onChange={(event) => change({ nthToDefault: event.currentTarget.value }, "nthToDefault")}
      />
      <Problems title="Before it can be priced" problems={problems} />
      <Problems title="Why there are no new figures" problems={problems.length > 0 ? [] : nth.problems} />
      {nth.report?.warnings.map((warning) => (
        <Alert key={warning.code} color="yellow">
          {warning.message}
        </Alert>
      ))}
      {nth.isBusy && (
        <Text size="sm" c="dimmed" role="status">
          <Loader size="xs" /> Working out the contracts…
        </Text>
      )}
      {nth.report && nth.report.nthToDefault.length > 0 && <Contracts contracts={nth.report.nthToDefault} />}
      {nth.report && (nth.of?.nthToDefault?.length ?? 0) === 0 && (
        <Text size="sm" c="dimmed">
          No contract is asked for.
        </Text>
      )}
      <Title order={2} size="h4">
        Two names together
      </Title>
      {!isPaired && request && (
        <Text size="sm" c="dimmed">
          {request.correlation.kind === "base"
            ? "A base curve says nothing of two names: choose a flat, loadings or sector correlation to see pairs."
            : `Pairs are laid out for pools of up to ${MOST_PAIRED} names.`}
        </Text>
      )}
      <Problems
        title="Why there are no new figures of pairs"
        problems={problems.length > 0 || !isPaired ? [] : pairs.problems}
      />
      {pairs.isBusy && (
        <Text size="sm" c="dimmed" role="status">
          <Loader size="xs" /> Working out the pairs…
        </Text>
      )}
      {isPaired && pairs.report?.pairs && pairs.of && <Pairs pairs={pairs.report.pairs} of={pairs.of} />}
    </>
  );
}
