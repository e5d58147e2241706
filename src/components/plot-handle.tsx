import type { ComponentProps } from 'react';
import { classNames } from '#src/lib/class-names.ts';

/** A thin slider for what is moved along an axis. */
export function PlotHandle({ className, ...rest }: ComponentProps<'input'>) {
  return (
    <input
      {...rest}
      type="range"
      className={classNames(
        'h-5 w-full cursor-ew-resize appearance-none rounded-full bg-transparent disabled:opacity-55',
        '[&::-moz-range-track]:h-0.5 [&::-moz-range-track]:bg-edge [&::-webkit-slider-runnable-track]:h-0.5 [&::-webkit-slider-runnable-track]:bg-edge',
        '[&::-moz-range-thumb]:size-3.5 [&::-moz-range-thumb]:rounded-full [&::-moz-range-thumb]:border-0 [&::-moz-range-thumb]:bg-ink',
        '[&::-webkit-slider-thumb]:-mt-1.5 [&::-webkit-slider-thumb]:size-3.5 [&::-webkit-slider-thumb]:appearance-none [&::-webkit-slider-thumb]:rounded-full [&::-webkit-slider-thumb]:bg-ink',
        className,
      )}
    />
  );
}
