import {
  Stack,
  Table,
  TableScrollContainer,
  TableTbody,
  TableTd,
  TableTh,
  TableThead,
  TableTr,
  Text,
  Title,
} from "@mantine/core";
import { ask } from "@/app/_ui/ask";
import { queries } from "@/lib/activity/queries";

export const metadata = { title: "Activity" };

/** What changed in the workspace, newest first. */
export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace } = await params;
  const { rows, isLast } = await ask(queries.list, { workspaceId: workspace });
  return (
    <Stack>
      <Title order={1}>Activity</Title>
      <TableScrollContainer minWidth={480}>
        <Table>
          <TableThead>
            <TableTr>
              <TableTh>When (UTC)</TableTh>
              <TableTh>Who</TableTh>
              <TableTh>What</TableTh>
            </TableTr>
          </TableThead>
          <TableTbody>
            {rows.map((row) => (
              <TableTr key={row.id}>
                <TableTd>{row.at.slice(0, 19).replace("T", " ")}</TableTd>
                <TableTd>{row.by}</TableTd>
                <TableTd>{row.kind.replace(".", ": ")}</TableTd>
              </TableTr>
            ))}
          </TableTbody>
        </Table>
      </TableScrollContainer>
      {!isLast && <Text c="dimmed">Older entries are not shown.</Text>}
    </Stack>
  );
}
