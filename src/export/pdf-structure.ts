import type { Part, PartTable } from '../drawing/shapes.ts';
import { pdfText, type PdfObjects } from './pdf-objects.ts';
import { printable } from './printable.ts';

/** A node of the tree that programs which read a document aloud walk through (ISO 32000-1:2008, 14.7 and 14.8). */
interface Element {
  type: 'Document' | 'H1' | 'H2' | 'P' | 'Figure' | 'Table' | 'TR' | 'TH' | 'TD';
  kids: Element[];
  /** marked pieces of pages that it consists of */ marks: { page: number; mark: number }[];
  alt?: string;
}

const TYPES = { title: 'H1', heading: 'H2', paragraph: 'P', figure: 'Figure' } as const;

/**
 * What the marks of a document are, in the order of reading. Pages tell which part comes; shapes of no part are ornament. A table goes on where its next page has the same one; where
 * something else came between, a further table begins.
 */
export class PdfStructure {
  private readonly document: Element = { type: 'Document', kids: [], marks: [] };
  private readonly elements = new Map<Part, Element>();
  private readonly tables = new Map<PartTable, { element: Element; rows: Map<number, Element> }>();
  /** of each page, the element of each mark by number */ private readonly pages: Element[][] = [];

  get empty(): boolean {
    return this.elements.size === 0;
  }

  /** Opens the marks of a part on a page. @returns the operators before them */
  begin(part: Part | undefined, page: number): string {
    if (part === undefined) return '/Artifact BMC\n';
    const element = this.elementOf(part);
    const marks = (this.pages[page] ??= []);
    element.marks.push({ page, mark: marks.length });
    return `/${element.type} << /MCID ${marks.push(element) - 1} >> BDC\n`;
  }

  /** Writes the tree. @param pages  numbers of the page objects @returns number of its root */
  write(objects: PdfObjects, pages: readonly number[]): number {
    const root = objects.reserve();
    const numbers = new Map<Element, number>();
    const reserve = (element: Element): void => {
      numbers.set(element, objects.reserve());
      element.kids.forEach(reserve);
    };
    reserve(this.document);
    const put = (element: Element, parent: number): void => {
      const own = numbers.get(element)!;
      const [first] = element.marks;
      // Marks on the element's own page by number alone; those on others name theirs.
      const marks = element.marks.map(({ page, mark }) => (page === first.page ? String(mark) : `<< /Type /MCR /Pg ${pages[page]} 0 R /MCID ${mark} >>`));
      const kids = [...marks, ...element.kids.map((kid) => `${numbers.get(kid)!} 0 R`)].join(' ');
      objects.set(own, `<< /S /${element.type} /P ${parent} 0 R${first ? ` /Pg ${pages[first.page]} 0 R` : ''}${kids === '' ? '' : ` /K [${kids}]`}${element.alt === undefined ? '' : ` /Alt ${pdfText(printable(element.alt))}`}${element.type === 'TH' ? ' /A << /O /Table /Scope /Column >>' : ''} >>`);
      element.kids.forEach((kid) => put(kid, own));
    };
    put(this.document, root);
    const parents = pages.map((_, page) => `${page} [${(this.pages[page] ?? []).map((element) => `${numbers.get(element)!} 0 R`).join(' ')}]`);
    objects.set(root, `<< /Type /StructTreeRoot /K [${numbers.get(this.document)!} 0 R] /ParentTree << /Nums [${parents.join(' ')}] >> /ParentTreeNextKey ${pages.length} >>`);
    return root;
  }

  private elementOf(part: Part): Element {
    const there = this.elements.get(part);
    if (there) return there;
    const element = part.as === 'cell' ? this.cellOf(part) : this.added({ type: TYPES[part.as], kids: [], marks: [], ...(part.as === 'figure' ? { alt: part.alt } : {}) });
    this.elements.set(part, element);
    return element;
  }

  private added(element: Element): Element {
    // The document's title stands in the block at the foot and is heard first.
    if (element.type === 'H1') this.document.kids.unshift(element);
    else this.document.kids.push(element);
    return element;
  }

  private cellOf({ table, row, column }: Extract<Part, { as: 'cell' }>): Element {
    let found = this.tables.get(table);
    if (found === undefined || this.document.kids[this.document.kids.length - 1] !== found.element) {
      found = { element: this.added({ type: 'Table', kids: [], marks: [] }), rows: new Map() };
      this.tables.set(table, found);
    }
    let line = found.rows.get(row);
    if (line === undefined) {
      const type = row < table.heads ? 'TH' : 'TD';
      // Every row has all its cells, so that columns are told right where one is empty.
      line = { type: 'TR', kids: Array.from({ length: table.columns }, (): Element => ({ type, kids: [], marks: [] })), marks: [] };
      found.rows.set(row, line);
      found.element.kids.push(line);
    }
    return line.kids[column];
  }
}
