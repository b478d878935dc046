import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryColumn,
  type Relation,
} from 'typeorm';
import type { Role } from '../../shared/words';
import { Person } from '../people/person.entity';
import { Production } from './production.entity';

@Entity('membership')
@Check('membership_role_known', "role IN ('lead', 'technical-director', 'artist')")
export class Membership {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'membership_pk' })
  productionId!: string;

  @Index('membership_of_person')
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'membership_pk' })
  personId!: string;

  @Column({ type: 'varchar', length: 20 })
  role!: Role;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  @ManyToOne(() => Production, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'production_id', foreignKeyConstraintName: 'membership_production' })
  production!: Relation<Production>;

  @ManyToOne(() => Person, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'membership_person' })
  person!: Relation<Person>;
}
