export interface MemberRow {
  id: string;
  name: string;
  email: string;
  role: string;
  roleWords: string;
  since: string;
  isMe: boolean;
}

export interface InvitationRow {
  id: string;
  email: string;
  roleWords: string;
  /** "until tomorrow 11:00", "ran out". */
  holds: string;
  isOver: boolean;
}

/** Null when it went through, else the sentence to show. */
export type PeopleAct = Promise<string | null>;
