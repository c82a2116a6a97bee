export const ROLES = ["trainee", "instructor", "owner"] as const;
export type Role = (typeof ROLES)[number];

const ALLOWED = {
  "lesson:watch": ["trainee", "instructor", "owner"],
  "value:doubt": ["trainee", "instructor", "owner"],
  "quiz:take": ["trainee", "instructor", "owner"],
  "sign-off:request": ["trainee", "instructor", "owner"],
  "records:own": ["trainee", "instructor", "owner"],
  "account:edit": ["trainee", "instructor", "owner"],
  "recording:upload": ["instructor", "owner"],
  "lesson:edit": ["instructor", "owner"],
  "lesson:publish": ["instructor", "owner"],
  "mark:check": ["instructor", "owner"],
  "value:stop": ["instructor", "owner"],
  "sign-off:give": ["instructor", "owner"],
  "training:assign": ["instructor", "owner"],
  "training:see-all": ["instructor", "owner"],
  "team:see": ["instructor", "owner"],
  "team:edit": ["owner"],
  "shop:edit": ["owner"],
  "tasks:see": ["owner"],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof ALLOWED;
export const PERMISSIONS = Object.keys(ALLOWED) as Permission[];

/** The whole rule: no other role check exists in the application, on the server or on screen. */
export function can(role: Role, permission: Permission): boolean {
  const allowed: readonly Role[] = ALLOWED[permission];
  return allowed.includes(role);
}

/** What a permission lets a person do, for the sentence that refuses it and for DEVELOPERS.md. */
export const PERMISSION_WORDS: Record<Permission, string> = {
  "lesson:watch": "search and watch lessons",
  "value:doubt": "say that a value looks wrong",
  "quiz:take": "take quizzes",
  "sign-off:request": "ask for a sign-off",
  "records:own": "see own records",
  "account:edit": "change the own account",
  "recording:upload": "upload recordings",
  "lesson:edit": "work on the bench",
  "lesson:publish": "publish lessons",
  "mark:check": "check values of others",
  "value:stop": "stop a value and clear a doubt",
  "sign-off:give": "sign off others",
  "training:assign": "assign training",
  "training:see-all": "see who has shown what",
  "team:see": "see the team",
  "team:edit": "invite, change roles and remove people",
  "shop:edit": "change shop settings",
  "tasks:see": "see failed background tasks",
};
