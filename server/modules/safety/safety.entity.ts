import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { BriefingBody, Hazard } from '../../../shared/safety';

@Entity({ name: 'briefing' })
@Index(['installationId', 'key'], { unique: true })
export class Briefing {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text' }) key!: string;
  @Column({ type: 'text' }) title!: string;
  @Column({ type: 'simple-json' }) hazards!: Hazard[];
  @Column({ type: 'integer', name: 'validity_days' }) validityDays!: number;
  @Column({ type: 'integer' }) revision!: number;
}

@Entity({ name: 'briefing_version' })
@Index(['briefingId', 'version'], { unique: true })
export class BriefingVersion {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'briefing_id' }) briefingId!: string;
  @Column({ type: 'integer' }) version!: number;
  @Column({ type: 'text' }) kind!: 'first' | 'change' | 'correction';
  @Column({ type: 'integer', name: 'effective_from' }) effectiveFrom!: number;
  @Column({ type: 'text', nullable: true, name: 'what_changed' }) whatChanged!: string | null;
  @Column({ type: 'simple-json' }) body!: BriefingBody;
  @Column({ type: 'text', name: 'content_hash' }) contentHash!: string;
  @Column({ type: 'text', nullable: true, name: 'published_by' }) publishedBy!: string | null;
  /** A correction stands only with a second safety lead. */
  @Column({ type: 'text', nullable: true, name: 'second_by' }) secondBy!: string | null;
  @Column({ type: 'text' }) status!: 'proposed' | 'published';
  @Column({ type: 'integer', name: 'published_at' }) publishedAt!: number;
}

@Entity({ name: 'sign_off' })
@Index(['installationId', 'revision'])
@Index(['personId', 'briefingKey'])
export class SignOffRow {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text', name: 'briefing_key' }) briefingKey!: string;
  @Column({ type: 'integer' }) version!: number;
  @Column({ type: 'text', name: 'person_id' }) personId!: string;
  @Column({ type: 'simple-json' }) attempts!: { at: number; wrongIds: string[] }[];
  @Column({ type: 'text', nullable: true, name: 'talk_by' }) talkBy!: string | null;
  @Column({ type: 'integer', nullable: true, name: 'talk_at' }) talkAt!: number | null;
  @Column({ type: 'integer', nullable: true, name: 'passed_at' }) passedAt!: number | null;
  @Column({ type: 'integer', nullable: true, name: 'signed_at' }) signedAt!: number | null;
  /** Typed name or drawn path; removed when the person is erased. */
  @Column({ type: 'simple-json', nullable: true })
  signature!: { kind: 'typed' | 'drawn'; value: string } | null;
  @Column({ type: 'text', nullable: true, name: 'countersigned_by' }) countersignedBy!: string | null;
  @Column({ type: 'integer', nullable: true, name: 'countersigned_at' }) countersignedAt!: number | null;
  @Column({ type: 'text', nullable: true, name: 'countersigned_as' })
  countersignedAs!: 'safety lead' | 'organiser' | null;
  @Column({ type: 'integer', nullable: true, name: 'expires_at' }) expiresAt!: number | null;
  @Column({ type: 'integer', nullable: true, name: 'revoked_at' }) revokedAt!: number | null;
  @Column({ type: 'text', nullable: true, name: 'revoked_by' }) revokedBy!: string | null;
  @Column({ type: 'text', nullable: true, name: 'revoke_reason' }) revokeReason!: string | null;
  @Column({ type: 'integer' }) revision!: number;
}

/** One row of the chained sign-off register. Salt and personal fields stand outside the hash. */
@Entity({ name: 'register_row' })
export class RegisterRow {
  @PrimaryColumn({ type: 'text', name: 'installation_id' }) installationId!: string;
  @PrimaryColumn({ type: 'integer' }) seq!: number;
  @Column({ type: 'integer' }) at!: number;
  @Column({ type: 'text' }) kind!: string;
  @Column({ type: 'simple-json' }) ids!: Record<string, string | number>;
  @Column({ type: 'text' }) commitment!: string;
  @Column({ type: 'text', name: 'prev_hash' }) prevHash!: string;
  @Column({ type: 'text' }) hash!: string;
  @Column({ type: 'text', nullable: true }) salt!: string | null;
  @Column({ type: 'simple-json', nullable: true }) personal!: Record<string, string> | null;
  @Index()
  @Column({ type: 'text', nullable: true, name: 'person_id' })
  personId!: string | null;
}

@Entity({ name: 'stop' })
@Index(['installationId', 'revision'])
export class StopRow {
  @PrimaryColumn({ type: 'text' }) id!: string;
  @Column({ type: 'text', name: 'installation_id' }) installationId!: string;
  @Column({ type: 'text' }) scope!: 'hot-tools' | 'area' | 'everything';
  @Column({ type: 'text', nullable: true, name: 'station_id' }) stationId!: string | null;
  @Column({ type: 'text' }) reason!: string;
  @Column({ type: 'text', name: 'raised_by' }) raisedBy!: string;
  @Column({ type: 'integer', name: 'raised_at' }) raisedAt!: number;
  @Column({ type: 'text', nullable: true, name: 'lifted_by' }) liftedBy!: string | null;
  @Column({ type: 'integer', nullable: true, name: 'lifted_at' }) liftedAt!: number | null;
  @Column({ type: 'text', nullable: true, name: 'lift_note' }) liftNote!: string | null;
  @Column({ type: 'integer' }) revision!: number;
}

@Entity({ name: 'stop_seen' })
export class StopSeen {
  @PrimaryColumn({ type: 'text', name: 'stop_id' }) stopId!: string;
  @PrimaryColumn({ type: 'text', name: 'person_id' }) personId!: string;
  @Column({ type: 'integer' }) at!: number;
}
