export * from "@/lib/line/draft-schema";
