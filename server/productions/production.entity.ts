import { Check, Column, CreateDateColumn, Entity, PrimaryGeneratedColumn, Unique } from 'typeorm';

@Entity('production')
@Unique('production_name_once', ['name'])
@Check('production_name_given', 'length(trim(name)) > 0')
@Check('production_last_run_counts', 'last_run_number >= 0')
export class Production {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'production_pk' })
  id!: string;

  @Column({ type: 'varchar', length: 120 })
  name!: string;

  /** Number of the newest run; a run takes the next one by raising it, so numbers never repeat. */
  @Column({ type: 'integer', default: 0 })
  lastRunNumber!: number;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;
}
