"use client";

import { Button, Group, NativeSelect, TextInput, Title } from "@mantine/core";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import type { Problem } from "@/lib/platform/errors";
import { canonicalJson } from "@/lib/pricing/canonical";
import { blankShock, type ShockReading, shockFormOf } from "@/lib/scenarios/form";
import { useDeal } from "../_frame/dealContext";
import type { Scenarios, StressText } from "./text";

/** Takes a kept scenario up as the common shock, and keeps, saves or deletes one. */
export function ScenarioBar({
  scenarios,
  mayEdit,
  text,
  reading,
  onChange,
}: {
  scenarios: Scenarios["scenarios"];
  mayEdit: boolean;
  text: StressText;
  reading: ShockReading;
  onChange(part: Partial<StressText>): void;
}) {
  const { workspaceId } = useDeal();
  const router = useRouter();
  const [name, setName] = useState("");
  const [isBusy, setBusy] = useState(false);
  const [refused, setRefused] = useState<readonly Problem[]>([]);
  const chosen = scenarios.find(({ id }) => id === text.of?.id);
  const isChanged =
    chosen !== undefined &&
    canonicalJson(reading.ok ? reading.shock : null) !== canonicalJson(chosen.content.shock);

  const choose = (id: string) => {
    const next = scenarios.find((scenario) => scenario.id === id);
    setRefused([]);
    onChange(
      next
        ? { shock: shockFormOf(next.content.shock), of: { id: next.id, version: next.version } }
        : { shock: blankShock, of: null },
    );
  };
  const act = async (work: () => Promise<{ ok: true } | { ok: false; problems: readonly Problem[] }>) => {
    setBusy(true);
    const answer = await work();
    setBusy(false);
    setRefused(answer.ok ? [] : answer.problems);
    router.refresh();
  };
  const keepNew = () =>
    act(async () => {
      if (!reading.ok) return { ok: false, problems: reading.problems };
      const answer = await call("scenarios.create", {
        workspaceId,
        name,
        content: { shock: reading.shock, note: "" },
      });
      if (!answer.ok) return answer;
      setName("");
      onChange({ of: { id: answer.output.scenarioId, version: 1 } });
      return { ok: true };
    });
  const save = () =>
    act(async () => {
      if (!chosen || !text.of || !reading.ok) return { ok: true };
      const answer = await call("scenarios.save", {
        workspaceId,
        scenarioId: chosen.id,
        version: text.of.version,
        name: chosen.name,
        content: { ...chosen.content, shock: reading.shock },
      });
      if (!answer.ok) return answer;
      onChange({ of: { id: chosen.id, version: answer.output.version } });
      return { ok: true };
    });
  const remove = () =>
    act(async () => {
      if (!chosen) return { ok: true };
      const answer = await call("scenarios.remove", { workspaceId, scenarioId: chosen.id });
      if (!answer.ok) return answer;
      onChange({ of: null });
      return { ok: true };
    });

  return (
    <>
      <Group gap="xs" align="end" mb="xs">
        <Title order={2} size="h5" mr="md">
          Common shock
        </Title>
        <NativeSelect
          size="xs"
          aria-label="Scenario"
          data={[
            { value: "", label: scenarios.length > 0 ? "No scenario" : "No scenario kept yet" },
            ...scenarios.map((row) => ({ value: row.id, label: row.name })),
          ]}
          value={chosen?.id ?? ""}
          onChange={(event) => choose(event.currentTarget.value)}
        />
        {isChanged && (
          <Button size="xs" variant="default" onClick={() => choose(chosen.id)}>
            Take {chosen.name} as kept
          </Button>
        )}
        {mayEdit && (
          <>
            {isChanged && (
              <Button size="xs" onClick={save} loading={isBusy} disabled={!reading.ok}>
                Save {chosen.name}
              </Button>
            )}
            <TextInput
              size="xs"
              aria-label="Name of the new scenario"
              placeholder="Name of a new scenario"
              maxLength={120}
              value={name}
              onChange={(event) => setName(event.currentTarget.value)}
            />
            <Button
              size="xs"
              variant="default"
              onClick={keepNew}
              loading={isBusy}
              disabled={!reading.ok || name.trim() === ""}
            >
              Keep as scenario
            </Button>
            {chosen && (
              <Button size="xs" variant="default" onClick={remove} loading={isBusy}>
                Delete {chosen.name}
              </Button>
            )}
          </>
        )}
      </Group>
      <Problems title="The scenario was not kept" problems={refused} />
      {text.of && chosen && chosen.version !== text.of.version && (
        <Problems
          title={`Someone saved ${chosen.name} meanwhile`}
          problems={[
            {
              code: "staleVersion",
              path: "version",
              message: "Take the scenario as kept, or keep yours under a new name: nothing typed is lost.",
            },
          ]}
        />
      )}
    </>
  );
}
