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
  Unique,
} from 'typeorm';
import type { ImportReport, Model as ModelWire } from '../../shared/wire/models';
import { Person } from '../people/person.entity';
import { Production } from '../productions/production.entity';

@Entity('model')
@Check('model_format_known', "format IN ('bezier-patch-text', 'step')")
@Check('model_name_given', 'length(trim(name)) > 0')
@Check('model_bytes_fit', 'bytes > 0 AND bytes = octet_length(original)')
@Check('model_sha256_fits', "sha256 = encode(sha256(original), 'hex')")
@Check('model_unit_positive', "unit > 0 AND unit < 'Infinity'::double precision")
@Check('model_has_patches', 'patch_count > 0')
@Unique('model_in_production', ['productionId', 'id'])
@Index('model_of_production', ['productionId', 'createdAt', 'id'])
export class Model {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'model_pk' })
  id!: string;

  @Column({ type: 'uuid' })
  productionId!: string;

  @Column({ type: 'varchar', length: 120 })
  name!: string;

  @Column({ type: 'varchar', length: 255 })
  fileName!: string;

  @Column({ type: 'varchar', length: 20 })
  format!: ModelWire['format'];

  @Column({ type: 'integer' })
  bytes!: number;

  @Column({ type: 'char', length: 64 })
  sha256!: string;

  /** The file exactly as it arrived. */
  @Column({ type: 'bytea', select: false })
  original!: Buffer;

  /** `modelPatchesSchema` as JSON, gzipped: sent as it lies here. */
  @Column({ type: 'bytea', select: false })
  patches!: Buffer;

  @Column({ type: 'integer' })
  patchCount!: number;

  /** Metres per unit of the file. */
  @Column({ type: 'double precision' })
  unit!: number;

  @Column({ type: 'boolean', default: false })
  unitConfirmed!: boolean;

  /** In the file's unit. */
  @Column({ type: 'jsonb' })
  bounds!: ModelWire['bounds'];

  @Column({ type: 'jsonb' })
  report!: ImportReport;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  @Column({ type: 'uuid' })
  createdById!: string;

  @ManyToOne(() => Production, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'production_id', foreignKeyConstraintName: 'model_production' })
  production!: Relation<Production>;

  @ManyToOne(() => Person, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'created_by_id', foreignKeyConstraintName: 'model_created_by' })
  createdBy!: Relation<Person>;
}
