import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { Duty } from '../../../shared/accounts';
import type { AgeBand } from '../../../shared/safety';

/** Somebody who takes part in one installation, with or without an account. */
@Entity({ name: 'person' })
@Index(['installationId', 'revision'])
@Index(['installationId', 'number'], { unique: true })
@Index(['installationId', 'accountId'], { unique: true })
export class Person {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text', nullable: true, name: 'account_id' }) accountId!: string | null;
  /** Said and typed at the crib. */
  @Column({ type: 'integer' }) number!: number;
  @Column({ type: 'text', name: 'first_name' }) firstName!: string;
  @Column({ type: 'text' }) initial!: string;
  @Column({ type: 'text', nullable: true }) email!: string | null;
  @Column({ type: 'text', name: 'age_band' }) ageBand!: AgeBand;
  /** The adult a minor came with, as the minor wrote it. */
  @Column({ type: 'text', nullable: true, name: 'adult_name' }) adultName!: string | null;
  @Column({ type: 'simple-json' }) duties!: Duty[];
  @Column({ type: 'integer', name: 'joined_at' }) joinedAt!: number;
  @Column({ type: 'integer', nullable: true, name: 'confirmed_at' }) confirmedAt!: number | null;
  @Column({ type: 'text', nullable: true, name: 'confirmed_by' }) confirmedBy!: string | null;
  /** Null while on site. */
  @Column({ type: 'integer', nullable: true, name: 'left_at' }) leftAt!: number | null;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
  @Column({ type: 'integer', nullable: true, name: 'erased_at' }) erasedAt!: number | null;
  @Column({ type: 'integer' }) revision!: number;
}
