import type { FileHandle } from '../../components/shared/opened-file.ts';

/** A file on a disk that tests can break. */
export function fakeFile(name: string, text: string) {
  const disk = {
    text, modified: 1000, aborted: 0, fails: null as Error | null,
    change(next: string) {
      disk.text = next;
      disk.modified += 1000;
    },
    handle: {
      kind: 'file', name,
      getFile: async () => new File([disk.text], name, { lastModified: disk.modified }),
      createWritable: async () => {
        let next = '';
        return {
          write: async (data: Blob) => {
            if (disk.fails) throw disk.fails;
            next += await data.text();
          },
          close: async () => disk.change(next),
          abort: async () => void disk.aborted++,
        };
      },
    } as FileHandle,
  };
  return disk;
}
