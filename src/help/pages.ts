/** The pages of the help in their order. The build puts each file and picture beside the page under a name of its own, so they are fetched when they are read. */
export const HELP_PAGES = [
  { file: 'first-five-minutes.md', title: 'First five minutes', address: new URL('./first-five-minutes.md', import.meta.url).href },
  { file: 'mesh.md', title: 'Band diagram', address: new URL('./mesh.md', import.meta.url).href },
  { file: 'contact-integral.md', title: 'Contact resistivity', address: new URL('./contact-integral.md', import.meta.url).href },
  { file: 'sizing.md', title: 'Sizing', address: new URL('./sizing.md', import.meta.url).href },
  { file: 'tolerance.md', title: 'Tolerances', address: new URL('./tolerance.md', import.meta.url).href },
  { file: 'keys.md', title: 'Keys', address: new URL('./keys.md', import.meta.url).href },
  { file: 'promises.md', title: 'Promises', address: new URL('./promises.md', import.meta.url).href },
  { file: 'cautions.md', title: 'Cautions', address: new URL('./cautions.md', import.meta.url).href },
] as const;

export const HELP_PICTURES: Readonly<Record<string, string>> = {
  'pictures/plate.png': new URL('./pictures/plate.png', import.meta.url).href,
  'pictures/narrow.png': new URL('./pictures/narrow.png', import.meta.url).href,
  'pictures/dark.png': new URL('./pictures/dark.png', import.meta.url).href,
  'pictures/mesh.png': new URL('./pictures/mesh.png', import.meta.url).href,
  'pictures/contact.png': new URL('./pictures/contact.png', import.meta.url).href,
  'pictures/sizing.png': new URL('./pictures/sizing.png', import.meta.url).href,
  'pictures/tolerance.png': new URL('./pictures/tolerance.png', import.meta.url).href,
};
