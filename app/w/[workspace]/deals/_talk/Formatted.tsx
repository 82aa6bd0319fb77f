"use client";

import Markdown from "react-markdown";
import { readable } from "./mentions";
import type { MemberName } from "./shown";
import styles from "./talk.module.css";

const ALLOWED = ["p", "strong", "em", "code", "pre", "ul", "ol", "li", "a", "br", "img"];

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
          // Nothing is fetched from elsewhere: a picture stays text.
          img: ({ alt, src }) => `![${alt ?? ""}](${typeof src === "string" ? src : ""})`,
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
