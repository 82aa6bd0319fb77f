import { type TaskMessage, tasks } from "./tasks";

/** A server thread answers the task that it is sent. */
export default function work({ kind, input }: Omit<TaskMessage, "id">): unknown {
  return tasks[kind](input as never);
}
