"use client";

import Markdown from "react-markdown";
import type { MemberName } from "./shown";
import styles from "./talk.module.css";

const ALLOWED = ["p", "strong", "em", "code", "pre", "ul", "ol", "li", "a", "br"];

/** A comment with simple formatting: bold, code, lists, links and line breaks; anything else is text. Nothing can run. */
export function Formatted({ body, members }: { body: string; members: readonly MemberName[] }) {
  return (
    <div className={styles.body}>
      <Markdown
        allowedElements={ALLOWED}
        unwrapDisallowed
        components={{
          a: ({ href, children }) => (
            <a href={href} rel="noopener noreferrer nofollow" target="_blank">
              {children}
            </a>
          ),
          strong: ({ children }) => {
            const isName =
              typeof children === "string" && members.some(({ name }) => `@${name}` === children);
            return <strong className={isName ? styles.mention : undefined}>{children}</strong>;
          },
        }}
      >
        {readable(body, members)}
      </Markdown>
    </div>
  );
}

/** Line breaks stay as typed, bare web addresses become links, people named by @ stand out. */
function readable(body: string, members: readonly MemberName[]): string {
  const linked = body.replace(/(^|[\s(])(https?:\/\/[^\s<>")]+)/g, "$1<$2>");
  const named = members.reduce((text, { name }) => text.split(`@${name}`).join(`**@${name}**`), linked);
  return named.replace(/\n/g, "  \n");
}
