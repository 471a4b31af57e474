import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { BuildDayRecord, InstallationRecord } from '../../../shared/contracts/live';

@Entity({ name: 'installation' })
export class Installation {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text' }) name!: string;
  @Column({ type: 'text' }) venue!: string;
  @Column({ type: 'text', name: 'time_zone' }) timeZone!: string;
  @Column({ type: 'text' }) unit!: 'mm' | 'inch';
  @Column({ type: 'integer', name: 'hall_limit' }) hallLimit!: number;
  @Column({ type: 'text' }) status!: 'draft' | 'published' | 'closed';
  @Index({ unique: true })
  @Column({ type: 'text', name: 'join_code' })
  joinCode!: string;
  @Column({ type: 'integer', name: 'join_code_at' }) joinCodeAt!: number;
  @Column({ type: 'simple-json' }) settings!: InstallationRecord['settings'];
  @Column({ type: 'integer', name: 'created_at' }) createdAt!: number;
  /** Raised by one in every transaction that changes anything of the installation. */
  @Column({ type: 'integer' }) revision!: number;
  /** Revision at which the installation's own fields last changed. */
  @Column({ type: 'integer', name: 'own_revision' }) ownRevision!: number;
}

@Entity({ name: 'build_day' })
@Index(['installationId', 'revision'])
export class BuildDay {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text' }) date!: string;
  @Column({ type: 'text' }) doors!: string;
  @Column({ type: 'text' }) start!: string;
  @Column({ type: 'text', name: 'clear_up' }) clearUp!: string;
  @Column({ type: 'text' }) end!: string;
  @Column({ type: 'simple-json' }) breaks!: BuildDayRecord['breaks'];
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}

@Entity({ name: 'station' })
@Index(['installationId', 'revision'])
export class Station {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text' }) name!: string;
  @Column({ type: 'text' }) kind!: string;
  @Column({ type: 'integer' }) places!: number;
  @Column({ type: 'integer' }) position!: number;
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}

/** Lets one projector read the projector's view and nothing else. */
@Entity({ name: 'display_token' })
export class DisplayToken {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Index()
  @Column({ type: 'text', name: 'installation_id' })
  installationId!: string;
  @Column({ type: 'text' }) label!: string;
  @Index({ unique: true })
  @Column({ type: 'text', name: 'token_hash' })
  tokenHash!: string;
  @Column({ type: 'integer', name: 'created_at' }) createdAt!: number;
  @Column({ type: 'integer', nullable: true, name: 'closed_at' }) closedAt!: number | null;
}
