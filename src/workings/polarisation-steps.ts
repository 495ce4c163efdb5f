import { polarisationAlongMetalFace, polarisationOf } from '../../solver/polarisation.ts';
import { isAlloy, type Polarisation } from '../../solver/index.ts';
import { composition } from './bands-steps.ts';
import { pointOf, type Context, type Point } from './context.ts';
import { formula } from './formula.ts';
import { charge, DESIGN, known, WORKED, type Known } from './known.ts';
import { materialAsks } from './published.ts';
import { step, type Step } from './step.ts';

const PER_C_M2 = 1e-4;

/** Fixed charge of an interface: the design's own and the step of polarisation. */
export function sheetChargeSteps(context: Context, index: number, value: number): Step[] {
  const fixed = context.stack.interfaces.find((i) => i.index === index)?.sheetCharge ?? 0;
  const at = context.design.interfaces?.findIndex((i) => i.above === context.design.layers[index].name) ?? -1;
  const own = known('σ_own', 'fixed charge given in the design, in units of +q', fixed, 'q cm⁻²', DESIGN, { path: at < 0 ? 'interfaces' : `interfaces[${at}].sheetCharge` });
  const sigma = known('σ', 'fixed charge on the interface', value, 'q cm⁻²', WORKED);
  if (!context.stack.crystal) return [step(sigma, formula`${own}`, 'The design says nothing of polarity: no polarisation charge is counted.')];
  const above = polarisationSteps(context, pointOf(context, index, context.stack.layers[index].thickness), 'above');
  const below = polarisationSteps(context, pointOf(context, index + 1, 0), 'below');
  const face = context.stack.crystal.face === 'metal' ? formula`(${below.known} - ${above.known})` : formula`(${above.known} - ${below.known})`;
  return [...above.steps, ...below.steps, step(sigma, formula`${face} / ${charge} + ${own}`, `Metal-face direction${context.stack.crystal.face === 'metal' ? ' out of the top' : ' into the stack: N face up'}. Ambacher et al., J. Appl. Phys. 85, 3222 (1999).`)];
}

function polarisationSteps(context: Context, point: Point, mark: string): { known: Known; steps: Step[] } {
  const crystal = context.stack.crystal!;
  const { material } = point.layer;
  const constants = polarisationOf(material, point.x);
  const P = known(`P_${mark}`, `polarisation of ${point.layer.name} along the metal face`, polarisationAlongMetalFace(material, point.x, crystal), 'C/m²', WORKED, { scale: PER_C_M2 });
  if (!constants) return { known: P, steps: [step(P, formula`0`, `${material.id} is taken as not polar.`)] };
  const steps: Step[] = [];
  const part = (key: keyof Polarisation, sign: string, words: string, unit: string, scale: number): Known => {
    const read = (m: { polarisation?: Polarisation }): number | undefined => m.polarisation?.[key];
    if (!isAlloy(material)) return materialAsks(context.catalogue, material.id)(`polarisation.${key}`, sign, words, read(material), unit, scale);
    const x = composition(point);
    const [a, b] = [material.first, material.second].map((c, i) => materialAsks(context.catalogue, c.id)(`polarisation.${key}`, sign.replace(mark, i === 0 ? 'A' : 'B'), words, read(c), unit, scale));
    const k = known(sign, `${words} of ${point.layer.name}`, constants[key] as number, unit, WORKED, { scale });
    steps.push(step(k, formula`(1 - ${x}) * ${a} + ${x} * ${b}`));
    return k;
  };
  const spontaneous = part('spontaneous', `P_sp,${mark}`, 'spontaneous polarisation', 'C/m²', PER_C_M2);
  if (crystal.strain === 'relaxed') return { known: P, steps: [...steps, step(P, formula`${spontaneous}`, 'Relaxed: no strain, no piezoelectric part.')] };
  const template = polarisationOf(crystal.template!, crystal.templateX ?? 0)!;
  const a0 = materialAsks(context.catalogue, crystal.template!.id)('polarisation.lattice', 'a_0', 'lattice constant', template.lattice, 'pm', 1e-10);
  const a = part('lattice', `a_${mark}`, 'lattice constant', 'pm', 1e-10);
  const [e31, e33] = [part('e31', `e_31,${mark}`, 'piezoelectric constant e31', 'C/m²', PER_C_M2), part('e33', `e_33,${mark}`, 'piezoelectric constant e33', 'C/m²', PER_C_M2)];
  const [c13, c33] = [part('c13', `C_13,${mark}`, 'stiffness C13', stiffnessUnit, stiffnessScale), part('c33', `C_33,${mark}`, 'stiffness C33', stiffnessUnit, stiffnessScale)];
  return { known: P, steps: [...steps, step(P, formula`${spontaneous} + 2 * (${a0} - ${a}) / ${a} * (${e31} - ${e33} * ${c13} / ${c33})`)] };
}

const stiffnessUnit = 'GPa';
const stiffnessScale = 1;
