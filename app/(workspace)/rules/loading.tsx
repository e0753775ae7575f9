import { LoadingSheet } from '@/components/frame/loading-sheet';

export default function Loading() {
  return <LoadingSheet>Fetching the sheet</LoadingSheet>;
}
