/** An offline claim is worth nothing after two minutes: somebody else may stand at the bench. */
export const OFFLINE_CLAIM_MS = 120_000;
