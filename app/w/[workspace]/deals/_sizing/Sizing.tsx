"use client";

import { Alert, Group, Stack, Text, TextInput, Title } from "@mantine/core";
import { useDebouncedValue } from "@mantine/hooks";
import { useMemo } from "react";
import { Problems } from "@/app/_ui/Problems";
import { useKept } from "@/app/_ui/useKept";
import { usePieces } from "@/app/_ui/usePieces";
import {
  hasLimits,
  placedClasses,
  readSizing,
  type SizingForm,
  sizingFormOf,
} from "@/lib/alternatives/sizingForm";
import { useDeal } from "../_frame/dealContext";
import { NothingToShow } from "../_frame/NothingToShow";
import { type Alternatives, Compared } from "./Compared";
import { SizedActions } from "./SizedActions";
import { TargetTable } from "./TargetTable";

const PAUSE = 350;

/** The room that places boundaries from targets, and lays structures side by side. */
export function Sizing({ kept }: { kept: Alternatives }) {
  const { deal, request, form: dealForm } = useDeal();
  const [typed, setTyped] = useKept<SizingForm>(`sizing ${deal?.id ?? ""}`);
  const form = useMemo(() => typed ?? sizingFormOf(dealForm.classes), [typed, dealForm.classes]);
  const reading = useMemo(() => readSizing(form), [form]);
  const asked = useMemo(() => {
    if (!request || !reading.ok || !hasLimits(form)) return null;
    const { top, step, targets } = reading;
    const bare = { ...request, tranches: [], nthToDefault: [], include: [] };
    return { request: bare, top, step, targets };
  }, [request, reading, form]);
  const [settled] = useDebouncedValue(asked, PAUSE);
  const key = useMemo(() => (settled ? `sizing ${JSON.stringify(settled)}` : null), [settled]);
  const solved = usePieces("sizeClasses", key, settled ? [settled] : []);
  if (!request) return <NothingToShow what="Sizing" needsClass={false} />;
  const [answer] = solved.outputs;
  const sized = answer?.ok ? answer.classes : [];
  const placed = answer?.ok ? placedClasses(form, sized, answer.left, dealForm.classes) : null;
  const isWaiting = solved.isBusy || settled !== asked;
  const errorAt = (path: string) =>
    reading.ok ? undefined : reading.problems.find((problem) => problem.path === path)?.message;
  return (
    <Stack gap="lg">
      <section aria-labelledby="targets">
        <Group justify="space-between" align="end">
          <div>
            <Title order={2} size="h5" id="targets">
              Targets from the top down
            </Title>
            <Text size="sm" c="dimmed">
              Each class reaches as low as its limits allow; the next begins there, and the last takes what is
              left. Boundaries are rounded so that limits still hold.
            </Text>
          </div>
          <Group gap="xs" align="end">
            <TextInput
              size="xs"
              w={150}
              label="Highest detachment (%)"
              value={form.top}
              error={errorAt("top")}
              onChange={(event) => setTyped({ ...form, top: event.currentTarget.value })}
            />
            <TextInput
              size="xs"
              w={150}
              label="Boundaries in steps of (%)"
              value={form.step}
              error={errorAt("step")}
              onChange={(event) => setTyped({ ...form, step: event.currentTarget.value })}
            />
          </Group>
        </Group>
        <TargetTable
          form={form}
          sized={sized}
          left={answer?.ok && placed ? answer.left : null}
          isPlaced={answer?.ok === true && !isWaiting}
          errorAt={errorAt}
          onChange={setTyped}
        />
        <Text size="sm" c="dimmed" role="status" mt="xs">
          {statusWords(asked !== null, isWaiting, placed !== null)}
        </Text>
        {answer && !answer.ok && <Problems title="Nothing was placed" problems={answer.problems} />}
        {solved.problem && <Alert color="red">{solved.problem}</Alert>}
        <SizedActions
          form={form}
          placed={isWaiting ? null : placed}
          isTyped={typed !== null}
          onForget={() => setTyped(null)}
        />
      </section>
      <Compared kept={kept} placed={isWaiting ? null : placed} request={request} />
    </Stack>
  );
}

function statusWords(isAsked: boolean, isWaiting: boolean, isWhole: boolean): string {
  if (!isAsked) return "Type a limit for each class: the boundaries follow.";
  if (isWaiting) return "Placing boundaries in this browser…";
  return isWhole ? "Every class is placed." : "Not every class can be placed: see why beside it.";
}
