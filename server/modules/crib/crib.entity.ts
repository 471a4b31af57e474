import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { ToolTraits } from '../../../shared/contracts/live';
import type { Hazard } from '../../../shared/safety';

@Entity({ name: 'tool' })
@Index(['installationId', 'revision'])
@Index(['installationId', 'number'], { unique: true })
export class Tool {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  /** Such as `G-14`. */
  @Column({ type: 'text' }) number!: string;
  @Column({ type: 'text' }) name!: string;
  @Column({ type: 'text' }) kind!: string;
  @Column({ type: 'text', nullable: true }) hazard!: Hazard | null;
  @Column({ type: 'simple-json' }) traits!: ToolTraits;
  @Column({ type: 'text' }) condition!: string;
  @Column({ type: 'simple-json', nullable: true }) tag!: { reason: string; by: string; at: number } | null;
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}

/** One tool out of the crib with one person. */
@Entity({ name: 'checkout' })
@Index(['installationId', 'revision'])
@Index('checkout_one_out', ['toolId'], { unique: true, where: 'back_at IS NULL' })
export class Checkout {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text', name: 'tool_id' }) toolId!: string;
  @Column({ type: 'text', name: 'person_id' }) personId!: string;
  /** Set when it stands at a station in this person's charge. */
  @Column({ type: 'text', nullable: true, name: 'station_id' }) stationId!: string | null;
  @Column({ type: 'integer', name: 'out_at' }) outAt!: number;
  @Column({ type: 'text', name: 'out_by' }) outBy!: string;
  @Column({ type: 'integer', name: 'back_by' }) backBy!: number;
  @Column({ type: 'integer', nullable: true, name: 'back_at' }) backAt!: number | null;
  @Column({ type: 'text', nullable: true, name: 'taken_back_by' }) takenBackBy!: string | null;
  @Column({ type: 'text', nullable: true, name: 'condition_back' }) conditionBack!: string | null;
  @Column({ type: 'integer' }) revision!: number;
}
