"use client";

import { Button, Group } from "@mantine/core";
import { type ReactNode, useRef } from "react";
import { saveDrawing, savePicture } from "./chartFile";

/** A chart that can be taken away as a drawing (SVG) or a picture (PNG). */
export function Takeable({ name, children }: { name: string; children: ReactNode }) {
  const place = useRef<HTMLDivElement>(null);
  const withDrawing = (act: (name: string, drawing: SVGSVGElement) => unknown) => {
    const drawing = place.current?.querySelector<SVGSVGElement>("svg");
    if (drawing) void act(name, drawing);
  };
  return (
    <div ref={place}>
      {children}
      <Group gap="xs" justify="flex-end" className="screenOnly">
        <Button size="compact-xs" variant="subtle" color="gray" onClick={() => withDrawing(saveDrawing)}>
          SVG
        </Button>
        <Button size="compact-xs" variant="subtle" color="gray" onClick={() => withDrawing(savePicture)}>
          PNG
        </Button>
      </Group>
    </div>
  );
}
