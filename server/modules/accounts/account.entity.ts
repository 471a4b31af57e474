import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { SiteRole } from '../../../shared/accounts';

/** Somebody who signs in with e-mail and password. */
@Entity({ name: 'account' })
export class Account {
  @PrimaryColumn({ type: 'text' }) id!: string;
  /** Lower case. */
  @Index({ unique: true })
  @Column({ type: 'text' })
  email!: string;
  @Column({ type: 'text' }) name!: string;
  /** argon2id; null until the invitation is accepted. */
  @Column({ type: 'text', nullable: true, name: 'password_hash' }) passwordHash!: string | null;
  @Column({ type: 'text', name: 'site_role' }) siteRole!: SiteRole;
  @Column({ type: 'integer', name: 'created_at' }) createdAt!: number;
  @Column({ type: 'integer', nullable: true, name: 'disabled_at' }) disabledAt!: number | null;
}

/** A link that works once: first administrator, invitation, password reset. Only the hash of its secret is kept. */
@Entity({ name: 'one_time_link' })
export class OneTimeLink {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text' }) kind!: 'first-admin' | 'invite' | 'reset';
  @Index({ unique: true })
  @Column({ type: 'text', name: 'secret_hash' })
  secretHash!: string;
  @Column({ type: 'text', nullable: true, name: 'account_id' }) accountId!: string | null;
  @Column({ type: 'integer', name: 'created_at' }) createdAt!: number;
  @Column({ type: 'integer', name: 'expires_at' }) expiresAt!: number;
  @Column({ type: 'integer', nullable: true, name: 'used_at' }) usedAt!: number | null;
}
