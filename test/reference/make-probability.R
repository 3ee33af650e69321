# Tails and quantiles for test/engine/probability. Rscript test/reference/make-probability.R from the project folder; needs jsonlite.
x<-list(); f<-function(v)sprintf("%.17g",v)
for(df in c(0.7,1,2.5,5,30,100,1e4,1e6)) for(t in c(1e-8,0.3,1,2,5,30,200)) x[[length(x)+1]]<-c("t",f(t),f(df),"",f(2*pt(-t,df)))
for(df in c(0.7,1,2.5,5,30,100,1e4,1e6)) for(p in c(0.6,0.95,0.975,0.995,1-1e-7)) x[[length(x)+1]]<-c("tq",f(p),f(df),"",f(qt(p,df)))
for(d1 in c(1,2,5,17)) for(d2 in c(1.3,4,28,1e5)) for(v in c(1e-6,0.2,1,3,20,400)) x[[length(x)+1]]<-c("f",f(v),f(d1),f(d2),f(pf(v,d1,d2,lower.tail=FALSE)))
for(d1 in c(1,2,5,17)) for(d2 in c(1.3,4,28,1e5)) for(p in c(0.9,0.5,0.1,0.05,0.001)) x[[length(x)+1]]<-c("fq",f(p),f(d1),f(d2),f(qf(p,d1,d2,lower.tail=FALSE)))
writeLines(jsonlite::toJSON(list(madeBy=R.version.string,calls="2*pt(-t, df); qt(p, df); pf(f, df1, df2, lower.tail=FALSE); qf(p, df1, df2, lower.tail=FALSE)",values=do.call(rbind,x)),auto_unbox=TRUE,pretty=0),"test/reference/expected/probability.json")
