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
import type { MaterialPreset } from '../../shared/wire/materials';
import { Person } from '../people/person.entity';
import { Production } from '../productions/production.entity';

/** One version of a preset. A change is a new version; a run keeps the one it used. */
@Entity('material')
@Check('material_version_counts', 'version >= 1')
@Check('material_name_given', 'length(trim(name)) > 0')
@Check('material_source_given', 'length(trim(source)) > 0')
@Check('material_law_known', "law IN ('stable-neo-hookean', 'neo-hookean-a', 'neo-hookean-b')")
@Check('material_modulus_positive', 'youngs_modulus > 0')
@Check('material_density_positive', 'density > 0')
@Check('material_poisson_fits', 'poissons_ratio >= 0 AND poissons_ratio < 0.5')
@Check(
  'material_range_ordered',
  '(youngs_modulus_low IS NULL) = (youngs_modulus_high IS NULL) AND (youngs_modulus_low IS NULL OR (youngs_modulus_low > 0 AND youngs_modulus_low <= youngs_modulus_high))',
)
@Index('material_of_production', ['productionId', 'name', 'id'])
@Check('material_published_by_someone', '(production_id IS NULL) = (created_by_id IS NULL)')
export class Material {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'material_pk' })
  id!: string;

  @PrimaryColumn({ type: 'integer', primaryKeyConstraintName: 'material_pk' })
  version!: number;

  @Column({ type: 'varchar', length: 120 })
  name!: string;

  @Column({ type: 'varchar', length: 40 })
  family!: string;

  @Column({ type: 'varchar', length: 20 })
  law!: MaterialPreset['law'];

  /** Pa */
  @Column({ type: 'double precision' })
  youngsModulus!: number;

  @Column({ type: 'double precision', nullable: true })
  youngsModulusLow!: number | null;

  @Column({ type: 'double precision', nullable: true })
  youngsModulusHigh!: number | null;

  @Column({ type: 'double precision' })
  poissonsRatio!: number;

  /** kg/m³ */
  @Column({ type: 'double precision' })
  density!: number;

  @Column({ type: 'text' })
  source!: string;

  /** How well the source is known, in words. */
  @Column({ type: 'text' })
  status!: string;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  /** The production that published it; null for the studio's own presets. */
  @Column({ type: 'uuid', nullable: true })
  productionId!: string | null;

  @Column({ type: 'uuid', nullable: true })
  createdById!: string | null;

  @ManyToOne(() => Production, { nullable: true, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'production_id', foreignKeyConstraintName: 'material_production' })
  production!: Relation<Production> | null;

  @ManyToOne(() => Person, { nullable: true, onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'created_by_id', foreignKeyConstraintName: 'material_created_by' })
  createdBy!: Relation<Person> | null;
}
