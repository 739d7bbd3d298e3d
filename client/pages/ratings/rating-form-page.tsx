import { DeskPage } from '../../components/frame.tsx';

export function NewRatingPage() {
  return <DeskPage>New rating</DeskPage>;
}
export function EditRatingPage() {
  return <DeskPage>Rating</DeskPage>;
}
