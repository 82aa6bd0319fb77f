/** The notification channel; payload "<workspaceId> <eventId>". */
export const CHANNEL = "loadline_events";
