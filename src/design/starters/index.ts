import type { Design } from '../types.ts';
import backField from './back-field.json' with { type: 'json' };
import cryogenic from './cryogenic.json' with { type: 'json' };
import gradedCap from './graded-cap.json' with { type: 'json' };
import modulationDoped from './modulation-doped.json' with { type: 'json' };
import nitrideChannel from './nitride-channel.json' with { type: 'json' };
import pGanContact from './p-gan-contact.json' with { type: 'json' };
import pnDiode from './pn-diode.json' with { type: 'json' };
import schottky from './schottky.json' with { type: 'json' };
import tunnelJunction from './tunnel-junction.json' with { type: 'json' };

/** A worked design to start from; the scenario is invented. */
export interface Starter {
  id: string;
  /** the usual case that it covers */ summary: string;
  title: string;
  design: Design;
}

const starter = (id: string, summary: string, document: unknown): Starter => {
  // JSON has wider types than the document; a test reads and solves each of them.
  const design = document as Design;
  return { id, summary, title: design.title, design };
};

/** The first one opens on a first visit. */
export const starters: readonly Starter[] = [
  starter('pn-diode', 'p-n diode', pnDiode),
  starter('schottky', 'metal on a lightly doped layer', schottky),
  starter('graded-cap', 'ohmic contact with a graded cap', gradedCap),
  starter('modulation-doped', 'modulation-doped channel', modulationDoped),
  starter('nitride-channel', 'nitride channel with polarisation charge', nitrideChannel),
  starter('tunnel-junction', 'tunnel junction', tunnelJunction),
  starter('p-gan-contact', 'wide-gap p contact with a deep acceptor', pGanContact),
  starter('back-field', 'high-low back surface field', backField),
  starter('cryogenic', 'cryogenic layer', cryogenic),
];
