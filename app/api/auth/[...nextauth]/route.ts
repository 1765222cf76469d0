export { handleAuth as GET, handleAuth as POST } from '@/lib/platform/auth/handler';
