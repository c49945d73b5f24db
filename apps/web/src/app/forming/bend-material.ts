import { type FormingMaterialDto } from '@brakeven/contract';
import { type GaugeSystem } from '@brakeven/forming';

/** A material to bend, with the figures that are computed with and where they come from. */
export interface BendMaterial {
  code: string;
  name: string;
  tensileMpa: number;
  tensileSource: string;
  radiusPerOpening: number;
  densityGPerCm3: number;
  gaugeSystem: GaugeSystem;
}

/** A material of the shop as the calculators take it. */
export function toBendMaterial(material: FormingMaterialDto): BendMaterial {
  const { code, name, tensileSource, gaugeSystem } = material;
  return {
    code,
    name,
    tensileMpa: Number(material.tensileUsedMpa),
    tensileSource,
    radiusPerOpening: Number(material.radiusPerOpening),
    densityGPerCm3: Number(material.densityKgM3) / 1000,
    gaugeSystem,
  };
}
