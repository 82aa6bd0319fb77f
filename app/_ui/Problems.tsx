import { Alert, List } from "@mantine/core";
import type { Problem } from "@/lib/platform/errors";

const MOST_SHOWN = 50;

/** Why something was refused, all reasons at once. */
export function Problems({ problems, title }: { problems: readonly Problem[]; title: string }) {
  if (problems.length === 0) return null;
  const shown = problems.slice(0, MOST_SHOWN);
  return (
    <Alert color="red" variant="light" title={title} role="alert">
      <List size="sm">
        {shown.map(({ path, code, message }) => (
          <List.Item key={`${path} ${code}`}>{message}</List.Item>
        ))}
      </List>
      {problems.length > MOST_SHOWN ? `… and ${problems.length - MOST_SHOWN} more.` : null}
    </Alert>
  );
}
