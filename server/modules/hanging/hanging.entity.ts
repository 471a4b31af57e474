import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type {
  AnchorInput,
  HangingGear,
  PieceHangingInput,
  RiggerSheet,
} from '../../../shared/contracts/hanging';

/** A point of the venue that may carry something. */
@Entity({ name: 'anchor' })
@Index(['installationId', 'revision'])
export class Anchor {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text' }) name!: string;
  /** Place mm, rating and the venue's consent. */
  @Column({ type: 'simple-json' }) detail!: Pick<AnchorInput, 'at' | 'rating' | 'consent'>;
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}

/** Lines, hooks and knots that are used in one installation. */
@Entity({ name: 'hanging_gear' })
export class HangingGearRow {
  @PrimaryColumn({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'simple-json' }) gear!: HangingGear;
  @Column({ type: 'integer' }) revision!: number;
}

/** How one piece hangs. */
@Entity({ name: 'piece_hanging' })
@Index(['installationId', 'revision'])
export class PieceHanging {
  @PrimaryColumn({ type: 'text', name: 'sub_assembly_id' }) subAssemblyId!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'simple-json' }) detail!: PieceHangingInput;
  /** The competent rigger who signed this very arrangement; gone as soon as it changes. */
  @Column({ type: 'simple-json', nullable: true }) sheet!: RiggerSheet | null;
  @Column({ type: 'integer' }) revision!: number;
}
