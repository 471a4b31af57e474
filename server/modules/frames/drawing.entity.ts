import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { DrawingSettings, PlacementInput } from '../../../shared/contracts/drawing';

/** Where a frame and its copies stand in the drawing. */
@Entity({ name: 'placement' })
@Index(['installationId', 'revision'])
export class Placement {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text', name: 'frame_id' }) frameId!: string;
  @Column({ type: 'text' }) name!: string;
  /** Position mm, turn in degrees, pattern of copies. */
  @Column({ type: 'simple-json' }) place!: Pick<PlacementInput, 'at' | 'turn' | 'pattern'>;
  @Column({ type: 'integer' }) position!: number;
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}

/** What turns a drawing's lines into wood; one row for each installation that changed it. */
@Entity({ name: 'drawing_settings' })
export class DrawingSettingsRow {
  @PrimaryColumn({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'simple-json' }) settings!: DrawingSettings;
  @Column({ type: 'integer' }) revision!: number;
}
