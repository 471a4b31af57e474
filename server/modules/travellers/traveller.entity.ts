import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { SplitOrigin } from '../../../shared/contracts/split';
import type { TemplateStep } from '../../../shared/contracts/travellers';
import type { Hazard } from '../../../shared/safety';
import type { Clocks, StepStateName } from '../../../shared/travellers';

/** The steps a traveller is made from. */
@Entity({ name: 'traveller_template' })
@Index(['installationId'])
export class TravellerTemplate {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text' }) name!: string;
  @Column({ type: 'simple-json' }) steps!: TemplateStep[];
  @Column({ type: 'integer' }) revision!: number;
}

/** What a crew claims, builds and carries. */
@Entity({ name: 'sub_assembly' })
@Index(['installationId', 'revision'])
@Index(['installationId', 'code'], { unique: true })
export class SubAssembly {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text', name: 'frame_id' }) frameId!: string;
  @Column({ type: 'text', nullable: true, name: 'template_id' }) templateId!: string | null;
  @Column({ type: 'text' }) code!: string;
  @Column({ type: 'text' }) name!: string;
  @Column({ type: 'integer' }) position!: number;
  /** A piece that a crew builds, or the joints where pieces meet. */
  @Column({ type: 'text', default: 'piece' }) kind!: 'piece' | 'field joint';
  /** Ids of the sub-assemblies that must have passed before its first step is ready. */
  @Column({ type: 'simple-json', default: '[]' }) needs!: string[];
  /** Where it lies in the split it was made from. */
  @Column({ type: 'simple-json', nullable: true }) origin!: SplitOrigin | null;
  @Column({ type: 'integer', name: 'traveller_revision' }) travellerRevision!: number;
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}

/** One operation on a traveller. */
@Entity({ name: 'step' })
@Index(['installationId', 'revision'])
@Index(['subAssemblyId', 'position'])
@Index(['state', 'dryUntil'])
export class StepRow {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text', name: 'sub_assembly_id' }) subAssemblyId!: string;
  @Column({ type: 'integer' }) position!: number;
  @Column({ type: 'text' }) operation!: string;
  @Column({ type: 'text' }) name!: string;
  @Column({ type: 'text', name: 'station_id' }) stationId!: string;
  @Column({ type: 'simple-json' }) hazards!: Hazard[];
  @Column({ type: 'simple-json', name: 'tool_kinds' }) toolKinds!: string[];
  @Column({ type: 'integer', name: 'crew_min' }) crewMin!: number;
  @Column({ type: 'integer', name: 'crew_max' }) crewMax!: number;
  @Column({ type: 'integer', name: 'planned_seconds' }) plannedSeconds!: number;
  @Column({ type: 'simple-json', nullable: true }) clocks!: Clocks | null;
  @Column({ type: 'integer', name: 'needs_check' }) needsCheck!: number;
  @Column({ type: 'text' }) state!: StepStateName;
  @Column({ type: 'simple-json', nullable: true }) held!: { reason: string; by: string; at: number } | null;
  @Column({ type: 'integer', nullable: true, name: 'started_at' }) startedAt!: number | null;
  @Column({ type: 'integer', nullable: true, name: 'finished_at' }) finishedAt!: number | null;
  @Column({ type: 'text', nullable: true, name: 'finished_by' }) finishedBy!: string | null;
  @Column({ type: 'integer', nullable: true, name: 'dry_until' }) dryUntil!: number | null;
  @Column({ type: 'integer', nullable: true, name: 'passed_at' }) passedAt!: number | null;
  @Column({ type: 'text', nullable: true, name: 'passed_by' }) passedBy!: string | null;
  @Column({ type: 'simple-json', nullable: true }) rework!: { reason: string; by: string; at: number } | null;
  @Column({ type: 'simple-json', nullable: true, name: 'hand_over' })
  handOver!: { from: string; to: string; at: number } | null;
  @Column({ type: 'simple-json' }) flags!: string[];
  @Column({ type: 'integer' }) revision!: number;
  @Column({ type: 'integer', nullable: true, name: 'removed_at' }) removedAt!: number | null;
}

/** A place on a step, held or once held. */
@Entity({ name: 'claim' })
@Index(['stepId', 'personId'])
@Index('claim_one_place', ['stepId', 'personId'], { unique: true, where: 'ended_at IS NULL' })
@Index(['personId', 'endedAt'])
export class Claim {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text', name: 'step_id' }) stepId!: string;
  @Column({ type: 'text', name: 'person_id' }) personId!: string;
  @Column({ type: 'integer', name: 'claimed_at' }) claimedAt!: number;
  @Column({ type: 'integer', nullable: true, name: 'ended_at' }) endedAt!: number | null;
  /** The event that ended it, or null. */
  @Column({ type: 'text', nullable: true, name: 'ended_by' }) endedBy!: string | null;
}
