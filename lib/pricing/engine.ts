/** What a report says it was made by; the version changes with every change of a figure. */
export const ENGINE = { name: "Loadline", version: "1.1.0" } as const;
