import type { MaterialsResponse } from '#shared/schemas/spring'
import { listMaterials, standardDiametersMm } from '#shared/spring/materials'
import type { Material, SteppedModulus, SourcedValue } from '#shared/spring/materials'
import { listCatalogueWires } from '../catalogue/list-wires'
import type { ServiceContext } from '../context'

/** Every material the calculation knows, with its values, their sources and the diameters that can be bought. */
export async function listSpringMaterials({ db }: Pick<ServiceContext, 'db'>): Promise<MaterialsResponse> {
  const wires = await listCatalogueWires(db)
  return { materials: listMaterials().map(material => describe(material, wires.filter(wire => wire.material === material.code).map(wire => wire.wireDiameterMm))) }
}

function describe(material: Material, catalogueDiametersMm: number[]): MaterialsResponse['materials'][number] {
  return {
    code: material.code, name: material.name, standard: material.standard, family: material.family,
    wireDiameterFromMm: material.strength.rangeMm.min, wireDiameterToMm: material.strength.rangeMm.max,
    youngsModulusMpa: modulus(material.youngsModulus), shearModulusMpa: modulus(material.shearModulus), densityKgPerM3: { ...material.densityKgPerM3 },
    temperatureLimitC: { ...material.temperatureLimitC }, modulusLossPerKelvin: { ...material.modulusLossPerKelvin }, stressReliefTempC: material.stressRelief.temperatureC, stressReliefMinutes: material.stressRelief.minutes,
    stressReliefOrigin: material.stressRelief.origin, stressReliefSource: material.stressRelief.source,
    resistsCorrosion: material.resistsCorrosion, corrosionNote: material.corrosionNote, strengthSource: material.strength.source, strengthOrigin: material.strength.origin,
    standardWires: standardDiametersMm(material.code).map(d => ({ wireDiameterMm: d, tensileStrengthMpa: material.strength.minimumMpa(d) })), catalogueDiametersMm,
  }
}

const modulus = (value: SourcedValue | SteppedModulus) => 'value' in value
  ? { ...value }
  : { origin: value.origin, source: value.source, steps: value.steps.map(step => ({ ...step, upToMm: Number.isFinite(step.upToMm) ? step.upToMm : null })) }
