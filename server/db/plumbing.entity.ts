import { Column, Entity, Index, PrimaryColumn, PrimaryGeneratedColumn } from 'typeorm';

/** A signed-in browser. The id is the hash of the cookie's secret, so the table opens no session. */
@Entity({ name: 'session' })
export class SessionRow {
  @PrimaryColumn({ type: 'text' }) id!: string;
  /** `account:ID`, `person:ID`, `display:ID`, or null before sign-in. */
  @Index()
  @Column({ type: 'text', nullable: true })
  principal!: string | null;
  @Column({ type: 'text' }) data!: string;
  @Column({ type: 'integer', name: 'expires_at' }) expiresAt!: number;
}

/** First answer to a request that must have no second effect. */
@Entity({ name: 'idempotency' })
export class IdempotencyRow {
  /** `person:ID` or `account:ID`. */
  @PrimaryColumn({ type: 'text' }) actor!: string;
  @PrimaryColumn({ type: 'text' }) key!: string;
  @Index()
  @Column({ type: 'text', nullable: true, name: 'installation_id' })
  installationId!: string | null;
  @Column({ type: 'text', name: 'body_hash' }) bodyHash!: string;
  @Column({ type: 'integer' }) status!: number;
  @Column({ type: 'text' }) reply!: string;
  @Column({ type: 'integer' }) at!: number;
}

/** Every accepted change, in order, never edited. Ids, no names. */
@Entity({ name: 'day_log' })
@Index(['installationId', 'seq'])
export class DayLogRow {
  @PrimaryGeneratedColumn({ type: 'integer' }) seq!: number;
  @Column({ type: 'text', nullable: true, name: 'installation_id' }) installationId!: string | null;
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', name: 'happened_at' }) happenedAt!: number;
  @Column({ type: 'integer', name: 'recorded_at' }) recordedAt!: number;
  /** `person:ID`, `account:ID` or `server`. */
  @Column({ type: 'text' }) actor!: string;
  @Column({ type: 'text', nullable: true, name: 'for_person_id' }) forPersonId!: string | null;
  @Column({ type: 'text' }) action!: string;
  /** What it was done to: ids and numbers. */
  @Column({ type: 'simple-json' }) subject!: Record<string, unknown>;
  /** Rules it broke although it stands. */
  @Column({ type: 'simple-json' }) flags!: string[];
}

/** A letter to be sent, written in the transaction that caused it. */
@Entity({ name: 'mail' })
export class MailRow {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'recipient' }) to!: string;
  @Column({ type: 'text' }) subject!: string;
  @Column({ type: 'text' }) text!: string;
  @Index()
  @Column({ type: 'text' })
  status!: 'queued' | 'sent' | 'failed';
  @Column({ type: 'integer' }) attempts!: number;
  @Column({ type: 'integer', name: 'created_at' }) createdAt!: number;
  @Column({ type: 'integer', name: 'next_try_at' }) nextTryAt!: number;
  @Column({ type: 'integer', nullable: true, name: 'sent_at' }) sentAt!: number | null;
}

/** A letter that the local mail server of the demo took in. */
@Entity({ name: 'outbox_letter' })
export class OutboxLetterRow {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'sender' }) from!: string;
  @Column({ type: 'text', name: 'recipient' }) to!: string;
  @Column({ type: 'text' }) subject!: string;
  @Column({ type: 'text' }) text!: string;
  @Column({ type: 'integer', name: 'received_at' }) receivedAt!: number;
}
