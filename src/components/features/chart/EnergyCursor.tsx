/** The movable energy line: a slider that pointer, touch and keys move. Arrows 1 %, Shift or Page 10 %, Home and End the ends. */
import { type KeyboardEvent, type PointerEvent, useRef } from "react";
import { ChartMark, type Technique } from "./ChartLine.tsx";

interface Props {
  readonly energyKeV: number;
  readonly rangeKeV: readonly [number, number];
  readonly x: number;
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
  readonly toKeV: (x: number) => number;
  readonly text: string;
  readonly points: readonly { key: string; technique: Technique; y: number }[];
  readonly onMove?: (energyKeV: number) => void;
}

/** Four digits: finer than a pixel, coarse enough to read. */
const tidy = (energyKeV: number): number => Number(energyKeV.toPrecision(4));

export function EnergyCursor(props: Props) {
  const { energyKeV, rangeKeV, x, top, bottom, left, right, onMove } = props;
  const area = useRef<SVGRectElement>(null);
  const within = (value: number): number => Math.min(rangeKeV[1], Math.max(rangeKeV[0], tidy(value)));

  const moveTo = (event: PointerEvent): void => {
    const box = area.current?.getBoundingClientRect();
    if (box && onMove) onMove(within(props.toKeV(left + ((event.clientX - box.left) / box.width) * (right - left))));
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const large = event.shiftKey ? 10 : 1;
    const steps: Readonly<Record<string, number>> = {
      ArrowLeft: -large,
      ArrowDown: -large,
      ArrowRight: large,
      ArrowUp: large,
      PageDown: -10,
      PageUp: 10,
    };
    const step = steps[event.key];
    const next =
      event.key === "Home"
        ? rangeKeV[0]
        : event.key === "End"
          ? rangeKeV[1]
          : step === undefined
            ? null
            : stepped(energyKeV, step);
    if (next === null || !onMove) return;
    event.preventDefault();
    onMove(within(next));
  };
  const words = `${Number(energyKeV.toPrecision(5))} keV`;
  const boxWidth = words.length * 8 + 14;
  const boxX = Math.min(Math.max(x - boxWidth / 2, left - 40), right + 20 - boxWidth + 40);

  return (
    <g>
      <line className="cursor-bright" x1={x + 1.5} x2={x + 1.5} y1={top} y2={bottom} />
      <line className="cursor" x1={x} x2={x} y1={top} y2={bottom} />
      {props.points.map((point) => (
        <ChartMark key={point.key} technique={point.technique} x={x} y={point.y} />
      ))}
      <rect className="cursor-box" x={boxX} y={bottom + 2} width={boxWidth} height={22} />
      <text className="cursor-text" x={boxX + boxWidth / 2} y={bottom + 17} textAnchor="middle">
        {words}
      </text>
      {onMove ? (
        <rect
          ref={area}
          className="cursor-area"
          x={left}
          y={top}
          width={right - left}
          height={bottom - top}
          role="slider"
          tabIndex={0}
          aria-label="Photon energy"
          aria-valuemin={rangeKeV[0]}
          aria-valuemax={rangeKeV[1]}
          aria-valuenow={energyKeV}
          aria-valuetext={props.text}
          onKeyDown={onKeyDown}
          onPointerDown={(event) => {
            event.currentTarget.setPointerCapture(event.pointerId);
            moveTo(event);
          }}
          onPointerMove={(event) => {
            if (event.currentTarget.hasPointerCapture(event.pointerId)) moveTo(event);
          }}
        />
      ) : null}
    </g>
  );
}

/** One step is 1 %, and always a visible change. */
function stepped(energyKeV: number, steps: number): number {
  return energyKeV * 1.01 ** steps;
}
