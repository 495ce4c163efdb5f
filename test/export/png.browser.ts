import { expect } from 'chai';
import { drawPlate } from '../../src/drawing/plate.ts';
import { svgText } from '../../src/drawing/svg-text.ts';
import { plateSvgToPng } from '../../src/export/png.ts';
import { inventedResult } from '../drawing/invented-result.ts';

/** Red, green, blue at a point. */
async function colourAt(png: Blob, x: number, y: number): Promise<number[]> {
  const bitmap = await createImageBitmap(png);
  const canvas = document.createElement('canvas');
  canvas.width = bitmap.width;
  canvas.height = bitmap.height;
  const context = canvas.getContext('2d')!;
  context.drawImage(bitmap, 0, 0);
  return [...context.getImageData(x, y, 1, 1).data.slice(0, 3)];
}

describe('a plate as PNG', () => {
  it('has the scale asked for and the paper and the shading of the plate', async () => {
    const plate = drawPlate(inventedResult(), { width: 600, height: 400 });
    const png = await plateSvgToPng(svgText(plate), 2);
    expect(png.type).to.equal('image/png');
    const bitmap = await createImageBitmap(png);
    expect([bitmap.width, bitmap.height]).to.deep.equal([1200, 800]);
    // Paper #FBFAF6 in a corner; the full valence band, 34 % of #5B3FA8 on it, just above the area's lower right corner.
    expect(await colourAt(png, 2, 2)).to.deep.equal([251, 250, 246]);
    const { right, bottom } = plate.axes.area;
    const filled = await colourAt(png, Math.round(2 * right) - 20, Math.round(2 * bottom) - 8);
    // A gradient may be rounded by one or two of 255.
    [197, 186, 220].forEach((channel, i) => expect(filled[i]).to.be.closeTo(channel, 2));
  });

  it('survives names that would break out of the drawing', async () => {
    const name = '</text><script>window.broken = true</script>"&<\u0000 ä 層';
    const png = await plateSvgToPng(svgText(drawPlate(inventedResult([name, name, name], name), { frame: 'full' })), 1);
    expect(png.size).to.be.greaterThan(5000);
    expect('broken' in window).to.equal(false);
  });

  it('says so where the text is no drawing or the picture would be too large', async () => {
    const refused = async (svg: string, scale: number): Promise<string> => {
      try {
        await plateSvgToPng(svg, scale);
        return '';
      } catch (error) {
        return (error as Error).message;
      }
    };
    expect(await refused('<svg', 1)).to.contain('cannot read the drawing');
    expect(await refused(svgText(drawPlate(inventedResult(), {})), 100)).to.contain('no picture of 96000');
    expect(await refused(svgText(drawPlate(inventedResult(), {})), 0)).to.contain('no picture of 0');
  });
});
