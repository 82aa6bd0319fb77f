import { Structure } from "../_structure/Structure";

export default function Page() {
  return <Structure />;
}
