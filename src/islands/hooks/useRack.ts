import { QueryClient, useQuery } from '@tanstack/react-query';
import { getJson } from '#contracts/client';
import type { RackLetter } from '#contracts/desk';

const RACK = ['rack'];

let inBrowser: QueryClient | undefined;

/** One client for the desk's two islands, so that they show one rack; on the server each rendering has its own. */
export function deskClient(): QueryClient {
  if (typeof window === 'undefined') return new QueryClient();
  return (inBrowser ??= new QueryClient());
}

/** The rack as the page brought it, asked for again when the coach comes back to the window. */
export function useRack(letters: RackLetter[], madeAt: number): RackLetter[] {
  const { data } = useQuery({
    queryKey: RACK,
    queryFn: () => getJson<RackLetter[]>('/api/desk/queue'),
    initialData: letters,
    initialDataUpdatedAt: madeAt,
    staleTime: 30_000,
    refetchOnWindowFocus: true,
  });
  return data;
}

/** Takes a member's letter out of the rack at once. @returns a function that puts it back */
export async function takeLetter(client: QueryClient, memberId: string): Promise<() => void> {
  await client.cancelQueries({ queryKey: RACK });
  const before = client.getQueryData<RackLetter[]>(RACK);
  client.setQueryData<RackLetter[]>(RACK, (now = []) => now.filter((letter) => letter.memberId !== memberId));
  return () => client.setQueryData(RACK, before);
}
