import { z } from 'zod';

/** Every error code the server may answer with, and its HTTP status. Nothing ever matches on message text. */
export const ERROR_STATUS = {
  // the request
  VALIDATION: 400,
  BODY_UNREADABLE: 400,
  BODY_TOO_LARGE: 413,
  IDEMPOTENCY_KEY_MISSING: 400,
  IDEMPOTENCY_KEY_REUSED: 409,
  // who is asking
  SIGN_IN_NEEDED: 401,
  SIGN_IN_FAILED: 401,
  EBADCSRFTOKEN: 403,
  NOT_ALLOWED: 403,
  NOT_FOUND: 404,
  TOO_MANY_FAILURES: 429,
  // accounts
  LINK_SPENT: 410,
  EMAIL_TAKEN: 409,
  LAST_ADMIN: 409,
  // installations
  INSTALLATION_CLOSED: 409,
  INSTALLATION_NOT_PUBLISHED: 409,
  PUBLISH_INCOMPLETE: 409,
  JOIN_CODE_UNKNOWN: 404,
  STALE_PAGE: 409,
  HALL_FULL: 409,
  IN_USE: 409,
  // people
  PERSON_NOT_CONFIRMED: 409,
  PERSON_NOT_ON_SITE: 409,
  ALREADY_CONFIRMED: 409,
  LAST_SAFETY_LEAD: 409,
  ADULT_MISSING: 409,
  // frames
  FRAME_INVALID: 422,
  OBJ_INVALID: 422,
  CSV_INVALID: 422,
  CODE_TAKEN: 409,
  // the split
  RUN_ACTIVE: 409,
  SPLIT_OUT_OF_DATE: 409,
  SPLIT_IMPOSSIBLE: 422,
  SPLIT_WORK_BEGUN: 409,
  DRAWING_EMPTY: 409,
  // steps
  STEP_CREW_FULL: 409,
  STEP_NOT_READY: 409,
  STEP_HELD: 409,
  STEP_NOT_HELD: 409,
  STEP_STATE: 409,
  STEP_ALREADY_YOURS: 409,
  STEP_NOT_YOURS: 409,
  STEP_CREW_TOO_SMALL: 409,
  STEP_NOT_STARTED: 409,
  STEP_CLOCK_RUNNING: 409,
  IN_HAND_LIMIT: 409,
  SIGN_OFF_MISSING: 409,
  AGE_RULE: 409,
  STOP_ACTIVE: 409,
  CHECKER_DID_WORK: 409,
  CHECKER_NEEDED: 403,
  HAND_OVER_NOT_OFFERED: 409,
  HAND_OVER_TO_SELF: 409,
  REWORK_TARGET: 409,
  OFFLINE_CLAIM_EXPIRED: 409,
  // safety
  BRIEFING_NOT_PASSED: 409,
  BRIEFING_PASSED: 409,
  BRIEFING_TALK_NEEDED: 409,
  BRIEFING_NOT_SIGNED: 409,
  BRIEFING_VERSION_OLD: 409,
  BRIEFING_PROPOSAL_WAITS: 409,
  BRIEFING_SIGNED: 409,
  COUNTERSIGN_SELF: 409,
  COUNTERSIGN_NOT_LEAD: 403,
  SECOND_LEAD_NEEDED: 409,
  SIGN_OFF_REVOKED: 409,
  STOP_LIFTED: 409,
  STOP_ALREADY_RAISED: 409,
  // crib
  TOOL_OUT: 409,
  TOOL_NOT_OUT: 409,
  TOOL_OUT_OF_USE: 409,
  TOOL_TAG_OTHER: 409,
  TOOL_NUMBER_TAKEN: 409,
  // the server itself
  INTERNAL: 500,
  UNAVAILABLE: 503,
} as const;

export type ErrorCode = keyof typeof ERROR_STATUS;

/** One field that is wrong: where, a code, and words for the person. */
export const fieldProblemSchema = z.object({ path: z.string(), code: z.string(), message: z.string() });
export type FieldProblem = z.infer<typeof fieldProblemSchema>;

/** Facts beside an error that words are made of: numbers, names, ids, times (ms). */
export type ErrorDetails = Record<string, unknown>;

/** Body of every reply that is no success, over HTTP and as a socket acknowledgement. */
export interface ErrorBody {
  error: {
    code: ErrorCode;
    message: string;
    fields?: FieldProblem[];
    details?: ErrorDetails;
    requestId: string;
  };
}
