import type { DopantModel } from '../../src/design/types.ts';

/** What the menus of the forms offer. */
export interface MaterialChoice {
  id: string;
  name: string;
  /** has a composition x */ alloy?: boolean;
}

export interface DopantChoice {
  id: string;
  name: string;
  /** id of the material it is known in */ host: string;
  kind: 'donor' | 'acceptor';
  /** ionisation models that its parameters are known for, the usual one first */ models: DopantModel[];
}

export interface MetalChoice {
  id: string;
  name: string;
}
