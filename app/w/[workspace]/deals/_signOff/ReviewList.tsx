"use client";

import { Badge, Button, Group, List, Paper, Stack, Text, Title } from "@mantine/core";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { call } from "@/app/_ui/call";
import { Problems } from "@/app/_ui/Problems";
import { saveFile } from "@/app/_ui/saveFile";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";
import { roomAddress } from "../_frame/rooms";
import { AnswerReview } from "./AnswerReview";

type Review = Operations["reviews.list"]["output"]["reviews"][number];

const stateWords: Record<Review["state"], string> = {
  open: "Open",
  signed: "Signed off",
  sentBack: "Sent back",
  withdrawn: "Withdrawn",
};

/** Every review of the deal, newest first: who stood behind which numbers. */
export function ReviewList({
  workspaceId,
  dealId,
  reviews,
  mayAsk,
}: {
  workspaceId: string;
  dealId: string;
  reviews: readonly Review[];
  mayAsk: boolean;
}) {
  return (
    <Stack gap="sm">
      <Title order={2} size="h4">
        Reviews
      </Title>
      {reviews.length === 0 && (
        <Text c="dimmed">
          No review yet. {mayAsk ? "Ask for one above." : "An owner or a structurer asks for one."}
        </Text>
      )}
      {reviews.map((review) => (
        <ReviewCard key={review.id} workspaceId={workspaceId} dealId={dealId} review={review} />
      ))}
    </Stack>
  );
}

function ReviewCard({
  workspaceId,
  dealId,
  review,
}: {
  workspaceId: string;
  dealId: string;
  review: Review;
}) {
  const router = useRouter();
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const [repeated, setRepeated] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const withdraw = async () => {
    const answer = await call("reviews.withdraw", { workspaceId, reviewId: review.id });
    setProblems(answer.ok ? [] : answer.problems);
    router.refresh();
  };
  const repeat = async () => {
    setBusy(true);
    const answer = await call("runs.repeat", { workspaceId, runId: review.runId });
    setBusy(false);
    if (!answer.ok) return setProblems(answer.problems);
    const { isSame, engineThen, engineNow } = answer.output;
    const engines =
      engineThen === engineNow ? `by ${engineNow}` : `then by ${engineThen}, now by ${engineNow}`;
    setRepeated(
      isSame
        ? `Priced again: the same to the bit, ${engines}.`
        : `Priced again: the report differs, ${engines}.`,
    );
  };
  const takeAway = async () => {
    const answer = await call("reviews.open", { workspaceId, reviewId: review.id });
    if (!answer.ok) return setProblems(answer.problems);
    saveFile(`review-of-run-${review.run}.json`, JSON.stringify(answer.output, null, 2), "application/json");
  };
  return (
    <Paper withBorder p="sm" component="article" aria-label={`Review of run ${review.run}`}>
      <Group justify="space-between" align="start">
        <div>
          <Text fw={600}>
            <Link href={roomAddress(workspaceId, dealId, `runs/${review.runId}`)}>Run {review.run}</Link>{" "}
            <Badge
              variant={review.state === "signed" ? "filled" : "outline"}
              color={review.state === "sentBack" ? "orange" : "teal"}
            >
              {stateWords[review.state]}
            </Badge>{" "}
            {review.state === "signed" && !review.holds && (
              <Badge variant="outline" color="orange">
                Changed since
              </Badge>
            )}
          </Text>
          <Text size="sm" c="dimmed">
            Asked by {review.askedBy}, {review.askedAt.slice(0, 16).replace("T", " ")} UTC, of{" "}
            {review.reviewers.join(", ")}; {review.needed} must sign; request{" "}
            <code title={review.requestHash}>{review.requestHash.slice(0, 12)}</code>
          </Text>
        </div>
        <Group gap="xs">
          <Button size="compact-xs" variant="default" onClick={repeat} loading={isBusy}>
            Price again, compare bits
          </Button>
          <Button size="compact-xs" variant="default" onClick={takeAway}>
            Take away as JSON
          </Button>
          {review.may.withdraw && (
            <Button size="compact-xs" variant="default" onClick={withdraw}>
              Withdraw
            </Button>
          )}
        </Group>
      </Group>
      {review.note && (
        <Text size="sm" mt="xs" style={{ whiteSpace: "pre-wrap" }}>
          {review.note}
        </Text>
      )}
      {review.answers.length > 0 && (
        <List size="sm" mt="xs">
          {review.answers.map(({ by, answer, reason, at }) => (
            <List.Item key={`${by} ${at}`}>
              {by} {answer === "signed" ? "signed off" : "sent it back"}, {at.slice(0, 16).replace("T", " ")}{" "}
              UTC
              {reason && `: ${reason}`}
            </List.Item>
          ))}
        </List>
      )}
      {repeated && (
        <Text size="sm" mt="xs" role="status">
          {repeated}
        </Text>
      )}
      <Problems title="This was refused" problems={problems} />
      {review.may.answer && <AnswerReview workspaceId={workspaceId} review={review} />}
    </Paper>
  );
}
