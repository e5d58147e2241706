import { useQuery } from '@tanstack/react-query';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { versionQuery } from '../api.ts';
import { useEditing } from '../editing/editor-context.ts';
import { FiguresStrip } from './figures-strip.tsx';

/** The result as it was stored with a version, with the engine that gave it. */
export function VersionResult({ caseId, n }: { caseId: string; n: number }) {
  const query = useQuery(versionQuery(caseId, n));
  const { areaUnit, setAreaUnit } = useEditing();
  if (query.isError) {
    return (
      <Failure what={`Version ${n}`} error={query.error} onRetry={() => void query.refetch()} />
    );
  }
  if (!query.data) {
    return (
      <Waiting what={`the result of version ${n}`}>
        <Skeleton className="h-20" />
      </Waiting>
    );
  }
  const { result, engine, hash } = query.data;
  return (
    <div className="flex flex-col gap-2">
      <FiguresStrip
        estimate={result.estimate}
        dimmed={false}
        unit={areaUnit}
        onUnit={setAreaUnit}
      />
      <p className="text-xs text-muted">
        Stored with version {n}, computed by {engine.name} {engine.version}. SHA-256{' '}
        <span className="font-mono break-all">{hash}</span>
      </p>
    </div>
  );
}
