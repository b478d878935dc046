import { Check, Column, CreateDateColumn, Entity, PrimaryGeneratedColumn, Unique } from 'typeorm';

@Entity('person')
@Unique('person_email_once', ['email'])
@Check('person_email_lower', 'email = lower(email)')
@Check('person_name_given', 'length(trim(name)) > 0')
export class Person {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'person_pk' })
  id!: string;

  @Column({ type: 'varchar', length: 120 })
  name!: string;

  @Column({ type: 'varchar', length: 254 })
  email!: string;

  @Column({ type: 'varchar', length: 60, select: false })
  passwordHash!: string;

  @Column({ type: 'boolean', default: false })
  administrator!: boolean;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;
}
