"use client";

import { Textarea, TextInput } from "@mantine/core";
import { Problems } from "@/app/_ui/Problems";
import { ClassesEditor } from "../_desk/ClassesEditor";
import { Hull } from "../_desk/Hull";
import { useDeal } from "../_frame/dealContext";
import { Terms } from "./Terms";

/** The room of the capital structure. */
export function Structure() {
  const { form, change, mayEdit, reading, problems, refused, problemAt } = useDeal();
  return (
    <>
      <Terms />
      <ClassesEditor
        classes={form.classes}
        isReadOnly={!mayEdit}
        problemAt={problemAt}
        onChange={(classes) => change({ classes })}
      />
      {reading.ok && reading.content.classes.length > 0 && <Hull classes={reading.content.classes} />}
      <TextInput
        label="n-th-to-default contracts"
        placeholder="1, 2, 3"
        disabled={!mayEdit}
        value={form.nthToDefault}
        error={problemAt("content.nthToDefault")}
        onChange={(event) => change({ nthToDefault: event.currentTarget.value }, "nthToDefault")}
      />
      <Textarea
        label="Notes"
        autosize
        minRows={2}
        disabled={!mayEdit}
        value={form.notes}
        error={problemAt("content.notes")}
        onChange={(event) => change({ notes: event.currentTarget.value }, "notes")}
      />
      {refused.length === 0 && <Problems title="Before it can be saved" problems={problems} />}
    </>
  );
}
