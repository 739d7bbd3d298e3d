import { DeskPage } from '../../components/frame.tsx';

export function NewProbePage() {
  return <DeskPage>New rating</DeskPage>;
}
export function EditProbePage() {
  return <DeskPage>Probe</DeskPage>;
}
