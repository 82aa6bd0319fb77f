"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import styles from "./frame.module.css";
import { roomAddress, rooms } from "./rooms";

/** The way between the rooms of a deal's desk. */
export function RoomTabs({ workspaceId, dealId }: { workspaceId: string; dealId: string }) {
  const path = usePathname();
  const home = roomAddress(workspaceId, dealId);
  return (
    <nav className={styles.rooms} aria-label="Rooms of the desk">
      {rooms.map(({ slug, label }) => {
        const to = roomAddress(workspaceId, dealId, slug);
        const isHere = slug === "" ? path === home : path === to || path.startsWith(`${to}/`);
        return (
          <Link key={slug} href={to} className={styles.room} aria-current={isHere ? "page" : undefined}>
            {label}
          </Link>
        );
      })}
    </nav>
  );
}
