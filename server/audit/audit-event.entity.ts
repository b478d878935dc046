import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
} from 'typeorm';
import type { AuditKind } from '../../shared/wire/audit';
import { Person } from '../people/person.entity';
import { Production } from '../productions/production.entity';

/** Written once; a trigger refuses changes. */
@Entity('audit_event')
@Check('audit_event_details_object', "jsonb_typeof(details) = 'object'")
@Index('audit_event_newest', ['createdAt', 'id'])
export class AuditEvent {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'audit_event_pk' })
  id!: string;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  @Column({ type: 'varchar', length: 40 })
  kind!: AuditKind;

  /** null when nobody known did it, as in a failed sign-in with an unknown address */
  @Column({ type: 'uuid', nullable: true })
  personId!: string | null;

  @Column({ type: 'uuid', nullable: true })
  productionId!: string | null;

  /** Network address of the request; null for set-up and other work without a request. */
  @Column({ type: 'varchar', length: 64, nullable: true })
  address!: string | null;

  /** Names and numbers worth reading later, such as the file name of an upload. */
  @Column({ type: 'jsonb' })
  details!: Record<string, string | number | boolean>;

  @ManyToOne(() => Person, { nullable: true, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'audit_event_person' })
  person!: Relation<Person> | null;

  @ManyToOne(() => Production, { nullable: true, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'production_id', foreignKeyConstraintName: 'audit_event_production' })
  production!: Relation<Production> | null;
}
