export { authRoute as GET, authRoute as POST } from "@/lib/http/auth-route";
