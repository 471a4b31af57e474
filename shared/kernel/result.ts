/** What a rule decided: a value, or a refusal the person can act on. */
export type Result<T, R> = { ok: true; value: T } | { ok: false; refusal: R };

/** Wrap a value that a rule allowed. */
export const ok = <T>(value: T): { ok: true; value: T } => ({ ok: true, value });

/** Wrap the reason why a rule said no. */
export const refuse = <R>(refusal: R): { ok: false; refusal: R } => ({ ok: false, refusal });
