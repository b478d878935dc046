import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Alone } from './alone';
import { Fault, Loading } from './states';

/** Loading and error states of one query; its data otherwise. */
export function QueryState<T>({
  query,
  loading,
  alone = false,
  children,
}: {
  query: UseQueryResult<T>;
  loading: string;
  /** the state has the screen to itself */
  alone?: boolean;
  children: (data: T) => ReactNode;
}) {
  if (query.data !== undefined) return <>{children(query.data)}</>;
  if (query.isError) {
    const fault = (
      <Fault title="This could not be fetched." onRetry={() => void query.refetch()}>
        {query.error.message}
      </Fault>
    );
    return alone ? <Alone>{fault}</Alone> : fault;
  }
  const state = <Loading>{loading}</Loading>;
  return alone ? <Alone>{state}</Alone> : state;
}
