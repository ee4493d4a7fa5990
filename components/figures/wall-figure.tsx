import { cn } from '@/lib/cn';

// Flow under a single watertight wall in ground of great depth. The net is exact, not a sketch: heads are constant along
// confocal hyperbolas and water moves along confocal ellipses, with the tip of the wall as their common focus. The classical
// solution; see M. Muskat, The Flow of Homogeneous Fluids through Porous Media, 1937 (from memory).
//   x = s sinh(u) sin(v),  depth = −s cosh(u) cos(v);  s: wall depth, u: constant on a path, v: constant on a line of equal head.

const drops = 10;
const wallDepth = 168;
const centre = { x: 720, y: 118 };
const reach = 2.75;
const waterTop = 50;
const bands = [
  '#f7f4e5',
  '#e9ead5',
  '#d9e1c8',
  '#c7d9bd',
  '#b2d0b6',
  '#9dc8b1',
  '#87bfaf',
  '#71b6af',
  '#5dabb1',
  '#4ca0b3',
];

function place(u: number, v: number): string {
  const x = centre.x + wallDepth * Math.sinh(u) * Math.sin(v);
  const y = centre.y - wallDepth * Math.cosh(u) * Math.cos(v);
  return `${x.toFixed(1)} ${y.toFixed(1)}`;
}

/** v of the line where the given part of the head is left: 1 at the upstream bed, 0 at the downstream bed. */
const angleOf = (part: number) => Math.PI * (0.5 + part);

function headLine(part: number): string[] {
  return Array.from({ length: 41 }, (_, step) => place((reach * step) / 40, angleOf(part)));
}

function path(u: number): string {
  const points = Array.from({ length: 81 }, (_, step) => place(u, angleOf(1 - step / 80)));
  return `M${points.join('L')}`;
}

const headLines = Array.from({ length: drops - 1 }, (_, line) => (line + 1) / drops);
const channels = Array.from({ length: 8 }, (_, channel) => ((channel + 1) * Math.PI) / drops);

/** A wall in deep ground with its exact flow net, ten equal drops of head; for the front page. */
export function WallFigure({ className }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 1440 560"
      preserveAspectRatio="xMidYMin slice"
      role="img"
      aria-label="A wall in deep ground with water standing higher on its left. Lines of equal head fan out from the wall in ten equal drops; paths of the water curve beneath its tip from left to right."
      className={cn('block w-full', className)}
    >
      <defs>
        <pattern id="wall-figure-sand" width="26" height="22" patternUnits="userSpaceOnUse">
          <path
            d="M4 5h.01M17 3h.01M11 12h.01M22 15h.01M3 18h.01"
            stroke="#17263a"
            strokeOpacity="0.42"
            strokeWidth="1.5"
            strokeLinecap="round"
          />
        </pattern>
      </defs>
      {bands.map((colour, band) => (
        <path
          key={colour}
          d={`M${[...headLine(band / drops), ...headLine((band + 1) / drops).reverse()].join('L')}Z`}
          fill={colour}
          fillOpacity="0.7"
        />
      ))}
      <rect x="0" y={centre.y} width="1440" height="460" fill="url(#wall-figure-sand)" />
      <rect
        x="0"
        y={waterTop}
        width={centre.x}
        height={centre.y - waterTop}
        fill="#4ca0b3"
        fillOpacity="0.16"
      />
      <g fill="none" stroke="#17263a" strokeWidth="1.1">
        {channels.map((u) => (
          <path key={u} d={path(u)} />
        ))}
      </g>
      <g fill="none" stroke="#0f6b5c" strokeWidth="1.1">
        {headLines.map((part) => (
          <path key={part} d={`M${headLine(part).join('L')}`} />
        ))}
      </g>
      <g className="figures" fontSize="15" fill="#0a5247" textAnchor="middle">
        {[0.8, 0.6, 0.5, 0.4, 0.2].map((part) => {
          const [x, y] = place(1.1, angleOf(part)).split(' ');
          return (
            <text
              key={part}
              x={x}
              y={Number(y) + 4}
              stroke="#e9ead5"
              strokeWidth="4"
              strokeLinejoin="round"
              paintOrder="stroke"
            >
              {Math.round(part * 100)} %
            </text>
          );
        })}
      </g>
      <path d={`M0 ${centre.y}H1440`} stroke="#17263a" strokeWidth="1.6" />
      <path d={`M0 ${waterTop}H${centre.x}`} stroke="#0f6b5c" strokeWidth="1.4" />
      <path
        d={`M${centre.x - 116} ${waterTop - 12}h14l-7 11z`}
        fill="none"
        stroke="#0f6b5c"
        strokeWidth="1.4"
      />
      <path
        d={`M${centre.x + 102} ${centre.y - 12}h14l-7 11z`}
        fill="none"
        stroke="#0f6b5c"
        strokeWidth="1.4"
      />
      <path d={`M${centre.x} ${waterTop - 26}V${centre.y + wallDepth}`} stroke="#17263a" strokeWidth="5" />
    </svg>
  );
}
