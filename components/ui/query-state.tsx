import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Fault, Loading } from './states';

/** Loading and error states of one query; its data otherwise. */
export function QueryState<T>({
  query,
  loading,
  children,
}: {
  query: UseQueryResult<T>;
  loading: string;
  children: (data: T) => ReactNode;
}) {
  if (query.data !== undefined) return <>{children(query.data)}</>;
  if (query.isError) {
    return (
      <Fault title="This could not be fetched." onRetry={() => void query.refetch()}>
        {query.error.message}
      </Fault>
    );
  }
  return <Loading>{loading}</Loading>;
}
