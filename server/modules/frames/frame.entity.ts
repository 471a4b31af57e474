import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { FrameSource } from '../../../shared/contracts/frames';
import type { Frame as FrameGeometry } from '../../../shared/frames';

/** One wireframe shape of an installation. */
@Entity({ name: 'frame' })
@Index(['installationId', 'revision'])
export class Frame {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text' }) name!: string;
  /** Where the geometry came from: a shape with its measures, a file, a table or a split. */
  @Column({ type: 'simple-json' }) source!: FrameSource;
  /** Joints in mm, struts and faces by joint index. */
  @Column({ type: 'simple-json' }) geometry!: FrameGeometry;
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}
