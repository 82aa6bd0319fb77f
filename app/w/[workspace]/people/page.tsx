import { Stack } from "@mantine/core";
import { ask } from "@/app/_ui/ask";
import { queries as reviews } from "@/lib/reviews/queries";
import { queries } from "@/lib/workspaces/queries";
import { People } from "./People";
import { ReviewSettingsForm } from "./ReviewSettingsForm";

export const metadata = { title: "People" };

export default async function Page({ params }: { params: Promise<{ workspace: string }> }) {
  const { workspace: workspaceId } = await params;
  const people = await ask(queries.people, { workspaceId });
  const { may, settings } = await ask(reviews.settings, { workspaceId });
  return (
    <Stack gap="xl">
      <People workspaceId={workspaceId} people={people} />
      <ReviewSettingsForm workspaceId={workspaceId} settings={settings} mayManage={may.manage} />
    </Stack>
  );
}
