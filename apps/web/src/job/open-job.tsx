import { getJob } from '@farlug/contract/routes';
import { rowsFromLists } from '@farlug/contract/rows';
import { useQuery } from '@tanstack/react-query';
import { createContext, type ReactNode, useContext, useEffect, useState, useSyncExternalStore } from 'react';
import { ask } from '../lib/call.ts';
import { ErrorState } from '../ui/error-state.tsx';
import { Skeleton } from '../ui/skeleton.tsx';
import { useToast } from '../ui/toast.tsx';
import { jobPort, keptEdits } from './job-port.ts';
import { Replica, type ReplicaSnapshot } from './replica.ts';
import { SolverClient } from './solver-client.ts';

interface OpenedJob {
  firm: string;
  job: string;
  archived: boolean;
  replica: Replica;
  solver: SolverClient;
}
const JobContext = createContext<OpenedJob | null>(null);

const OTHERS_EVERY_MS = 10_000;

/** Opens a job for the pages inside: its rows as a replica, and a solver in a worker that follows them. */
export function OpenJob({ firm, job, children }: { firm: string; job: string; children: ReactNode }) {
  const query = useQuery({
    queryKey: ['job', firm, job],
    queryFn: () => ask(getJob, { params: { firm, job } }),
    staleTime: Number.POSITIVE_INFINITY,
    gcTime: 0,
  });
  if (query.isPending) return <Skeleton rows={14} label="Opening the job" />;
  if (query.isError)
    return (
      <ErrorState title="The job cannot be opened" onRetry={() => void query.refetch()}>
        {query.error.message}
      </ErrorState>
    );
  const { rows, headSeq, archivedAt } = query.data;
  return (
    <Opened
      key={`${job} ${query.dataUpdatedAt}`}
      firm={firm}
      job={job}
      archived={archivedAt !== null}
      open={() => new Replica(rowsFromLists(rows), headSeq, keptEdits(job), jobPort(firm, job))}
    >
      {children}
    </Opened>
  );
}

interface OpenedProps {
  firm: string;
  job: string;
  archived: boolean;
  open: () => Replica;
  children: ReactNode;
}

function Opened({ firm, job, archived, open, children }: OpenedProps) {
  const [replica] = useState(open);
  const [solver, setSolver] = useState<SolverClient | null>(null);

  useEffect(() => {
    const client = new SolverClient(() => replica.getSnapshot().rows);
    const stop = replica.onChange((change) => client.follow(change));
    setSolver(client);
    return () => {
      stop();
      client.close();
    };
  }, [replica]);

  const toast = useToast();
  useEffect(
    () => replica.onOthers((person, label) => toast(`${person || 'Somebody else'}: ${label}`)),
    [replica, toast],
  );

  useEffect(() => {
    const look = () => {
      if (document.visibilityState === 'visible') void replica.refresh();
    };
    const timer = setInterval(look, OTHERS_EVERY_MS);
    const leave = (event: BeforeUnloadEvent) => {
      if (!replica.getSnapshot().settled) event.preventDefault();
    };
    window.addEventListener('focus', look);
    window.addEventListener('online', look);
    window.addEventListener('beforeunload', leave);
    return () => {
      clearInterval(timer);
      window.removeEventListener('focus', look);
      window.removeEventListener('online', look);
      window.removeEventListener('beforeunload', leave);
    };
  }, [replica]);

  if (!solver) return <Skeleton rows={14} label="Opening the job" />;
  return (
    <JobContext.Provider value={{ firm, job, archived, replica, solver }}>{children}</JobContext.Provider>
  );
}

export function useOpenJob(): OpenedJob {
  const opened = useContext(JobContext);
  if (!opened) throw new Error('useOpenJob stands outside OpenJob');
  return opened;
}

export function useReplica(): ReplicaSnapshot {
  const { replica } = useOpenJob();
  return useSyncExternalStore(replica.subscribe, replica.getSnapshot);
}
