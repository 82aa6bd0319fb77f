/** The signed-in person on whose behalf an operation runs. */
export interface Actor {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
}

/** What a member of a workspace is there to do. */
export const roles = ["owner", "structurer", "analyst", "viewer"] as const;
export type Role = (typeof roles)[number];

/** The actor's place in one workspace. */
export interface Membership {
  readonly workspaceId: string;
  readonly userId: string;
  readonly role: Role;
}
