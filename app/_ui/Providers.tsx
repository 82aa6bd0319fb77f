"use client";

import { createTheme, MantineProvider } from "@mantine/core";
import type { ReactNode } from "react";
import { CopyFigures } from "./CopyFigures";

const theme = createTheme({
  primaryColor: "teal",
  // White on this shade has the contrast of WCAG AA (4.5 to 1) in both colour schemes.
  primaryShade: 9,
  fontFamily: "system-ui, sans-serif",
  headings: { sizes: { h1: { fontSize: "1.5rem" } } },
});

/** The visual language, light and dark, for everything below. */
export function Providers({ children }: { children: ReactNode }) {
  return (
    <MantineProvider theme={theme} defaultColorScheme="auto">
      <CopyFigures />
      {children}
    </MantineProvider>
  );
}
