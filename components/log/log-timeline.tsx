"use client";

import { type KeyboardEvent, type PointerEvent, useRef } from "react";
import { MODE_WORDS } from "@/components/readings/mode-words";
import { cx } from "@/components/ui/cx";
import { formatNumber } from "@/components/ui/format";
import { useWidth } from "@/components/ui/use-width";
import { Words } from "@/components/ui/words";
import type { LaneView, LogView, SegmentView } from "./model";
import { outsidePath, type TraceScale, tracePath } from "./trace";

export interface Selection {
  fromS: number;
  toS: number;
}

export interface LogTimelineProps {
  log: LogView;
  /** The stretch in view. */
  view: Selection;
  selection: Selection;
  onSelect: (selection: Selection) => void;
  /** What the traces show, in words. */
  label: string;
}

const LEFT = 128;
const LANE = 56;
const r = (n: number) => Math.round(n * 10) / 10;

export function minutesSeconds(seconds: number): string {
  const whole = Math.round(seconds);
  return `${Math.floor(whole / 60)}:${String(whole % 60).padStart(2, "0")}`;
}

/**
 * Lanes on one time axis, the part outside its band in its family, the mode ribbon beneath. Two handles choose a
 * stretch: by pointer, by ← → (1 s, with Shift 10 s), or by pressing a piece of the ribbon.
 */
export function LogTimeline({ log, view, selection, onSelect, label }: LogTimelineProps) {
  const [ref, width] = useWidth(1184);
  const dragging = useRef<"fromS" | "toS" | null>(null);
  const svg = useRef<SVGSVGElement>(null);
  const left = width < 700 ? 8 : LEFT;
  const right = width - 4;
  const span = Math.max(1, view.toS - view.fromS);
  const x = (seconds: number) => left + ((seconds - view.fromS) / span) * (right - left);
  const seconds = (px: number) => view.fromS + ((px - left) / (right - left)) * span;
  const lanesHeight = log.lanes.length * LANE;
  const axisY = lanesHeight + 42;
  const height = axisY + 44;
  const step = [10, 30, 60, 120, 300, 600, 1200, 3600].find((s) => (s / span) * (right - left) > 70) ?? 3600;
  const ticks = Array.from({ length: Math.floor(view.toS / step) + 1 }, (_, i) => i * step).filter(
    (s) => s >= view.fromS,
  );
  const clamp = (s: number) => Math.min(log.spanS, Math.max(0, s));

  function move(handle: "fromS" | "toS", to: number) {
    const at = clamp(Math.round(to));
    onSelect(
      handle === "fromS"
        ? { fromS: Math.min(at, selection.toS - 1), toS: selection.toS }
        : { fromS: selection.fromS, toS: Math.max(at, selection.fromS + 1) },
    );
  }

  function onKeyDown(handle: "fromS" | "toS", event: KeyboardEvent) {
    const size = event.shiftKey ? 10 : 1;
    if (event.key === "ArrowLeft" || event.key === "ArrowRight") {
      event.preventDefault();
      move(handle, selection[handle] + (event.key === "ArrowLeft" ? -size : size));
    }
  }

  function pointerSeconds(event: PointerEvent): number {
    const box = svg.current?.getBoundingClientRect();
    return seconds(event.clientX - (box?.left ?? 0));
  }

  const selX = r(Math.max(left, x(selection.fromS)));
  const selEnd = r(Math.min(right, x(selection.toS)));
  return (
    <div className="tlwrap" ref={ref}>
      {/* biome-ignore lint/a11y/useSemanticElements: a drawing that holds controls; no HTML element groups inside SVG */}
      <svg
        ref={svg}
        className="chart tl"
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        role="group"
        aria-label={label}
        onPointerMove={(event) => dragging.current && move(dragging.current, pointerSeconds(event))}
        onPointerUp={() => {
          dragging.current = null;
        }}
        onPointerLeave={() => {
          dragging.current = null;
        }}
      >
        <defs>
          <pattern id="fd-dots" width="3" height="3" patternUnits="userSpaceOnUse">
            <rect className="inkfill" width="1.5" height="1.5" />
          </pattern>
          <pattern id="fd-hatch" width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
            <rect className="hatchink" width="1.2" height="4" />
          </pattern>
        </defs>
        <rect className="chosen-span" x={selX} y="0" width={Math.max(0, r(selEnd - selX))} height={axisY + 20} />
        {log.lanes.map((lane, index) => (
          <Lane
            key={lane.id}
            lane={lane}
            top={index * LANE}
            left={left}
            right={right}
            scale={{ x, fromS: view.fromS, toS: view.toS, stepS: log.stepS }}
          />
        ))}
        {left === LEFT && (
          <>
            <text className="lanename" x="0" y={lanesHeight + 25}>
              Mode
            </text>
            <text x="0" y={lanesHeight + 39}>
              found from the traces
            </text>
          </>
        )}
        {log.segments
          .filter((segment) => segment.toS > view.fromS && segment.fromS < view.toS)
          .map((segment) => (
            <RibbonPiece
              key={`${segment.mode}-${segment.fromS}`}
              segment={segment}
              x={Math.max(left, x(segment.fromS))}
              end={Math.min(right, x(segment.toS))}
              top={lanesHeight + 12}
              onChoose={() => onSelect({ fromS: Math.round(segment.fromS), toS: Math.round(segment.toS) })}
            />
          ))}
        <path className="ax" d={`M${left} ${axisY + 0.5}H${right}`} />
        {ticks.map((tick) => (
          <g key={tick}>
            <path className="ax" d={`M${r(x(tick))} ${axisY}v5`} />
            <text
              className="m faintm"
              x={r(x(tick))}
              y={axisY + 17}
              textAnchor={x(tick) < left + 12 ? "start" : "middle"}
            >
              {minutesSeconds(tick)}
            </text>
          </g>
        ))}
        {(["fromS", "toS"] as const).map((handle) => {
          const at = r(x(selection[handle]));
          if (at < left - 1 || at > right + 1) return null;
          return (
            <g
              key={handle}
              className="handle"
              role="slider"
              tabIndex={0}
              aria-label={handle === "fromS" ? "Beginning of the stretch" : "End of the stretch"}
              aria-valuemin={0}
              aria-valuemax={Math.round(log.spanS)}
              aria-valuenow={Math.round(selection[handle])}
              aria-valuetext={minutesSeconds(selection[handle])}
              onKeyDown={(event) => onKeyDown(handle, event)}
              onPointerDown={(event) => {
                dragging.current = handle;
                svg.current?.setPointerCapture?.(event.pointerId);
              }}
            >
              <rect className="grab" x={at - 12} y="0" width="24" height={axisY + 30} />
              <path className="edge" d={`M${at} 0V${axisY + 20}`} />
              <rect className="knob" x={at - 4} y={axisY + 6} width="8" height="22" rx="2" />
              <path className="grip" d={`M${at - 1.2} ${axisY + 12}v10M${at + 1.2} ${axisY + 12}v10`} />
              <text
                className="m handletime"
                x={handle === "fromS" ? at - 8 : at + 8}
                y={axisY + 40}
                textAnchor={handle === "fromS" ? "end" : "start"}
              >
                {minutesSeconds(selection[handle])}
              </text>
            </g>
          );
        })}
      </svg>
      {left !== LEFT && (
        <p className="label lanekey">
          {log.lanes.map((lane) => (
            <span key={lane.id}>
              <Words>{lane.label}</Words>, {lane.unit}
            </span>
          ))}
        </p>
      )}
    </div>
  );
}

interface LaneProps {
  lane: LaneView;
  top: number;
  left: number;
  right: number;
  scale: Omit<TraceScale, "y">;
}

function Lane({ lane, top, left, right, scale: time }: LaneProps) {
  const high = top + 6;
  const low = top + LANE - 10;
  const y = (value: number) =>
    r(low - ((Math.min(lane.max, Math.max(lane.min, value)) - lane.min) / (lane.max - lane.min || 1)) * (low - high));
  const scale: TraceScale = { ...time, y };
  const write = (n: number) => formatNumber(n, 0, { signed: lane.signed });
  const band = lane.band;
  const bandTop = band ? y(band.high ?? lane.max) : 0;
  const bandBottom = band ? y(band.low ?? lane.min) : 0;
  return (
    <g>
      {left === LEFT && (
        <>
          <text className="lanename" x="0" y={top + 25}>
            {lane.label}
          </text>
          <text x="0" y={top + 39}>
            {lane.unit}
          </text>
          <text className="m faintm" x={left - 8} y={low + 2} textAnchor="end">
            {write(lane.min)}
          </text>
          <text className="m faintm" x={left - 8} y={high + 8} textAnchor="end">
            {write(lane.max)}
          </text>
        </>
      )}
      {band && (
        <rect
          className="laneband"
          x={left}
          y={bandTop}
          width={right - left}
          height={Math.max(1, bandBottom - bandTop)}
        />
      )}
      <path className="hair" d={`M${left} ${top + LANE - 3}H${right}`} />
      {lane.traces.map((trace, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: traces of a lane are its banks, in order
        <g key={index}>
          <path className={cx("trace", trace.isDashed && "dashed")} d={tracePath(trace.points, scale)} />
          {band && lane.family.low && (
            <g className={lane.family.low}>
              <path
                className={cx("trace out", trace.isDashed && "dashed")}
                d={outsidePath(trace.points, band, "low", scale)}
              />
            </g>
          )}
          {band && lane.family.high && (
            <g className={lane.family.high}>
              <path
                className={cx("trace out", trace.isDashed && "dashed")}
                d={outsidePath(trace.points, band, "high", scale)}
              />
            </g>
          )}
        </g>
      ))}
    </g>
  );
}

interface RibbonPieceProps {
  segment: SegmentView;
  x: number;
  end: number;
  top: number;
  onChoose: () => void;
}

/** Modes by shape: starting dotted, idling a low bar, accelerating a rising wedge, cruising a plateau, decelerating a falling hatched wedge. */
function RibbonPiece({ segment, x, end, top, onChoose }: RibbonPieceProps) {
  const w = Math.max(1, end - x - 1);
  const bottom = top + 30;
  const X = r(x);
  const E = r(x + w);
  const words = `${MODE_WORDS[segment.mode]}, ${minutesSeconds(segment.fromS)} to ${minutesSeconds(segment.toS)}`;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a piece of a drawing
    <g
      className="piece"
      role="button"
      tabIndex={0}
      aria-label={words}
      onClick={onChoose}
      onKeyDown={(event) => {
        if (event.key === "Enter" || event.key === " ") {
          event.preventDefault();
          onChoose();
        }
      }}
    >
      <title>{words}</title>
      <rect className="grab" x={X} y={top} width={r(w)} height={30} />
      {segment.mode === "starting" || segment.mode === "key-on" ? (
        <rect x={X} y={top + 6} width={r(w)} height={24} fill="url(#fd-dots)" />
      ) : segment.mode === "idling" || segment.mode === "raised-idle" ? (
        <rect
          className="idlebar"
          x={X}
          y={bottom - (segment.mode === "idling" ? 4 : 10)}
          width={r(w)}
          height={segment.mode === "idling" ? 4 : 10}
        />
      ) : segment.mode === "accelerating" ? (
        <path className="inkfill" d={`M${X} ${bottom - 4}L${E} ${top + 2}V${bottom}H${X}z`} />
      ) : segment.mode === "cruising" ? (
        <>
          <rect className="bandfill" x={X} y={top + 2} width={r(w)} height={28} />
          <path className="plateau" d={`M${X} ${top + 2.75}H${E}`} />
        </>
      ) : (
        <path className="hatched" d={`M${X} ${top + 2}L${E} ${bottom - 4}V${bottom}H${X}z`} />
      )}
      {w > 56 && segment.mode !== "accelerating" && segment.mode !== "decelerating" && (
        <text className="piecename" x={X + 5} y={segment.mode === "cruising" ? top + 20 : top + 18}>
          {MODE_WORDS[segment.mode].toLowerCase()}
        </text>
      )}
    </g>
  );
}
