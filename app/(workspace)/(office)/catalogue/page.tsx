import { redirect } from 'next/navigation';

export default function CataloguePage() {
  redirect('/catalogue/valves');
}
