import type { MemberName } from "./shown";

/** Whom a comment names by @: the longest name that stands there, whole. */
export function mentionsIn(body: string, members: readonly MemberName[]): string[] {
  const found = new Set<string>();
  eachPlain(body, (text) =>
    text.replace(pattern(members), (words, name: string) => {
      for (const member of members) if (member.name === name) found.add(member.userId);
      return words;
    }),
  );
  return [...found];
}

/** A comment as Markdown: line breaks stay as typed, bare web addresses become links, people named by @ stand out. */
export function readable(body: string, members: readonly MemberName[]): string {
  return eachPlain(body, (text) =>
    text
      .replace(/(^|[\s(])(https?:\/\/[^\s<>")]+)/g, "$1<$2>")
      .replace(pattern(members), "**@$1**")
      .replace(/\n/g, "  \n"),
  );
}

/** Changes what is not code: between backticks everything stays as typed. */
function eachPlain(body: string, change: (text: string) => string): string {
  return body
    .split(/(```[\s\S]*?```|`[^`\n]*`)/)
    .map((part, i) => (i % 2 ? part : change(part)))
    .join("");
}

function pattern(members: readonly MemberName[]): RegExp {
  const names = members
    .map(({ name }) => name)
    .filter((name) => name !== "")
    .sort((a, b) => b.length - a.length)
    .map((name) => name.replace(/[.*+?^${}()|[\]\\]/g, "\\$&"));
  return names.length === 0 ? /(?!)/g : new RegExp(`@(${names.join("|")})(?![\\p{L}\\p{N}])`, "gu");
}
