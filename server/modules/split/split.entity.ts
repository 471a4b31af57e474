import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { SplitPlan, SplitWish } from '../../../shared/contracts/split';

/** A proposal of how the drawing is cut into pieces, and what became of it. */
@Entity({ name: 'split' })
@Index(['installationId', 'revision'])
export class Split {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  /** `proposed` until travellers are made from it, `taken` from then on, `replaced` when a later one was. */
  @Column({ type: 'text' }) status!: 'proposed' | 'taken' | 'replaced';
  /** The drawing's revision that was split. */
  @Column({ type: 'integer', name: 'drawing_revision' }) drawingRevision!: number;
  @Column({ type: 'simple-json' }) wish!: SplitWish;
  @Column({ type: 'simple-json' }) plan!: SplitPlan;
  @Column({ type: 'integer', name: 'made_at' }) madeAt!: number;
  @Column({ type: 'integer' }) revision!: number;
}
