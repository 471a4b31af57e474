import { useMemo } from 'react';
import { flatDrawing, formatFrameCsv, formatObj, type Frame } from '../../../shared/frames';

const WIDTH = 800;
const HEIGHT = 600;

/** The frame as files: for a drawing program, for a table, for paper. */
export function FrameDownloads({ frame, name }: { frame: Frame; name: string }) {
  const files = useMemo(
    () => [
      { ending: 'obj', words: 'OBJ', type: 'model/obj', text: () => formatObj(frame) },
      { ending: 'csv', words: 'CSV', type: 'text/csv', text: () => formatFrameCsv(frame) },
      { ending: 'svg', words: 'SVG', type: 'image/svg+xml', text: () => svgOf(frame) },
    ],
    [frame],
  );
  const save = (file: (typeof files)[number]) => {
    const address = URL.createObjectURL(new Blob([file.text()], { type: file.type }));
    const link = document.createElement('a');
    link.href = address;
    link.download = `${name.replace(/[^\p{L}\p{N}-]+/gu, '-') || 'frame'}.${file.ending}`;
    link.click();
    URL.revokeObjectURL(address);
  };
  return (
    <span className="flex flex-wrap items-baseline gap-x-4">
      <span className="text-pencil">save as</span>
      {files.map((file) => (
        <button key={file.ending} type="button" className="words-link" onClick={() => save(file)}>
          {file.words}
        </button>
      ))}
    </span>
  );
}

/** The flat drawing with its numbers, as a file of its own. */
function svgOf(frame: Frame): string {
  const drawing = flatDrawing(frame, { width: WIDTH, height: HEIGHT });
  const text = (x: number, y: number, words: string, weight: number) =>
    `<text x="${x.toFixed(1)}" y="${y.toFixed(1)}" font-family="sans-serif" font-size="13" font-weight="${weight}" text-anchor="middle" dominant-baseline="central">${words}</text>`;
  const lines = drawing.lines.map(
    ({ x1, y1, x2, y2 }) =>
      `<line x1="${x1.toFixed(1)}" y1="${y1.toFixed(1)}" x2="${x2.toFixed(1)}" y2="${y2.toFixed(1)}" stroke="#1e2430" stroke-width="1.2"/>`,
  );
  const numbers = [
    ...drawing.lines.map(({ label, strut }) => text(label.x, label.y, String(strut), 400)),
    ...drawing.points.map(({ label, joint }) => text(label.x, label.y, String(joint), 700)),
  ];
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${drawing.width} ${drawing.height}">${[...lines, ...numbers].join('')}</svg>\n`;
}
