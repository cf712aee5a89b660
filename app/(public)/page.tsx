import { HomePage } from "@/components/home/home-page";
import { readHome } from "@/lib/server/reading/read-home";

export default async function Home() {
  return <HomePage {...await readHome()} />;
}
